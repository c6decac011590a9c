import type { Basis } from '$lib/core/limits/basis';
import type { LimitRow } from '$lib/core/limits/limit';
import type { Connection } from '../db/database';
import type { StoredDistribution } from '../db/findDistributions';
import { findMeasuredConditions } from '../db/findMeasuredConditions';
import { capacitanceTable } from './capacitanceTable';
import { CAPACITANCE } from './readBasis';

/** The limits at one temperature and frequency, at every measured bias. */
export interface LimitGroup {
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
	readonly unit: string;
	readonly unitScale: number;
	readonly rows: readonly LimitRow[];
	readonly distributions: readonly StoredDistribution[];
}

/** Every limit of a product by one policy, temperature by temperature. */
export async function limitsOverview(
	db: Connection,
	asked: {
		readonly product: number;
		readonly basisHash: string;
		readonly policyVersion: number;
		readonly declaredBasis: Basis | undefined;
	}
): Promise<LimitGroup[]> {
	const { characteristic } = CAPACITANCE;
	const conditions = await findMeasuredConditions(db, { ...asked, characteristic });
	const groups: LimitGroup[] = [];
	for (const { temperatureCelsius, frequency } of conditions) {
		const table = await capacitanceTable(db, { ...asked, temperatureCelsius, frequency });
		if (!('status' in table)) groups.push(table);
	}
	return groups;
}
