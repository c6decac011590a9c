import type { Distribution } from '$lib/core/distributions/summary';
import type { Basis } from '$lib/core/limits/basis';
import type { LimitRow } from '$lib/core/limits/limit';
import { spreadByLot } from '$lib/core/limits/spreadByLot';
import type { Connection } from '../db/database';
import { findDistributions } from '../db/findDistributions';
import { findMeasuredConditions, type MeasuredConditions } from '../db/findMeasuredConditions';
import { capacitanceTable } from './capacitanceTable';
import { CAPACITANCE } from './readBasis';

/** A row of the curve's table, with what the stored sums say about its spread. */
export interface CurveRow {
	readonly limit: LimitRow;
	readonly distribution: Distribution;
	/** Relative standard deviations in %; `null` where there are no two lots. */
	readonly betweenPercent: number | null;
	readonly withinPercent: number | null;
}

export interface CapacitanceCurve {
	/** Every temperature and frequency that was measured. */
	readonly conditions: readonly MeasuredConditions[];
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
	readonly unit: string;
	readonly unitScale: number;
	readonly rows: readonly CurveRow[];
}

const ROOM_TEMPERATURE = 25;

/**
 * The C(V) curve of a product at one temperature and frequency. What is not asked, or was not
 * measured, is the temperature nearest to 25 °C, and the lowest frequency measured there.
 *
 * @returns `undefined` while there are no distributions
 */
export async function capacitanceCurve(
	db: Connection,
	asked: {
		readonly product: number;
		readonly basisHash: string;
		readonly policyVersion: number;
		readonly declaredBasis: Basis | undefined;
		readonly temperatureCelsius: number | undefined;
		readonly frequency: number | undefined;
	}
): Promise<CapacitanceCurve | undefined> {
	const scope = { ...asked, characteristic: CAPACITANCE.characteristic };
	const conditions = await findMeasuredConditions(db, scope);
	const chosen = chooseCondition(conditions, asked);
	if (chosen === undefined) return undefined;

	const { temperatureCelsius, frequency } = chosen;
	const table = await capacitanceTable(db, { ...asked, temperatureCelsius, frequency });
	if ('status' in table) return undefined;
	const stored = await findDistributions(db, { ...scope, temperatureCelsius });
	const byKey = new Map(stored.map(({ distribution: of }) => [of.conditionKey, of]));
	return {
		conditions,
		temperatureCelsius,
		frequency,
		unit: table.unit,
		unitScale: table.unitScale,
		rows: table.rows.flatMap((limit) => {
			const distribution = byKey.get(limit.conditionKey);
			if (distribution === undefined) return [];
			const { betweenPercent, withinPercent } = spreadByLot(distribution, table.unitScale);
			return [{ limit, distribution, betweenPercent, withinPercent }];
		})
	};
}

function chooseCondition(
	conditions: readonly MeasuredConditions[],
	asked: {
		readonly temperatureCelsius: number | undefined;
		readonly frequency: number | undefined;
	}
): MeasuredConditions | undefined {
	const distance = (of: MeasuredConditions) =>
		Math.abs(of.temperatureCelsius - (asked.temperatureCelsius ?? ROOM_TEMPERATURE));
	const nearest = conditions.toSorted((a, b) => distance(a) - distance(b))[0];
	const there = conditions.filter((of) => of.temperatureCelsius === nearest?.temperatureCelsius);
	return there.find((of) => of.frequency === asked.frequency) ?? there[0];
}
