import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import type { Basis } from '$lib/core/limits/basis';
import type { LimitRow } from '$lib/core/limits/limit';
import type { Connection } from '../db/database';
import { findDistributionBiases } from '../db/findDistributionBiases';
import type { CapacitanceCurve } from './capacitanceCurve';
import { capacitanceTable } from './capacitanceTable';
import { CAPACITANCE } from './readBasis';

/** Limits and median at a bias before rounding, in the unit of the curve. */
export interface BandPoint {
	readonly bias: number;
	readonly minimum: number | null;
	readonly typical: number;
	readonly maximum: number | null;
}

/** Limits of this many biases are computed at once; then other requests have their turn. */
const AT_ONCE = 8;

/**
 * The band of a curve at every bias whose distribution is stored, those between the measured ones
 * included, before drift, uncertainty and rounding: what is printed lies outside of it.
 */
export async function smoothBand(
	db: Connection,
	curve: CapacitanceCurve,
	by: {
		readonly product: number;
		readonly basisHash: string;
		readonly policyVersion: number;
		readonly declaredBasis: Basis;
	}
): Promise<BandPoint[]> {
	const { temperatureCelsius, frequency, unitScale } = curve;
	const keys = await findDistributionBiases(db, {
		...by,
		characteristic: CAPACITANCE.characteristic,
		temperatureCelsius
	});
	const biases = keys
		.map(readConditionKey)
		.filter((condition) => condition.frequency === frequency)
		.flatMap(({ reverseVoltage }) => reverseVoltage ?? [])
		.sort((a, b) => a - b);
	const rows: LimitRow[] = [];
	for (let first = 0; first < biases.length; first += AT_ONCE) {
		const table = await capacitanceTable(db, {
			...by,
			temperatureCelsius,
			frequency,
			biases: biases.slice(first, first + AT_ONCE)
		});
		if ('status' in table) return [];
		rows.push(...table.rows);
		await new Promise((next) => setImmediate(next));
	}
	const inUnit = (si: number) => Number((si / unitScale).toPrecision(6));
	return rows.flatMap(({ condition, minimum, typical, maximum }) =>
		typical === null
			? []
			: [
					{
						bias: condition.reverseVoltage ?? 0,
						minimum: minimum === null ? null : inUnit(minimum.raw),
						typical: inUnit(typical.raw),
						maximum: maximum === null ? null : inUnit(maximum.raw)
					}
				]
	);
}
