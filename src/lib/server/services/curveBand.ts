import { smoothBand, type BandPoint } from '$lib/core/limits/smoothBand';
import type { Database } from '../db/database';
import { findDistributions } from '../db/findDistributions';
import type { CapacitanceCurve } from './capacitanceCurve';
import { CAPACITANCE } from './readBasis';

/**
 * The band of a curve at every bias whose distribution is stored, those between the measured ones
 * included, in the unit of the curve.
 */
export async function curveBand(
	db: Database,
	curve: CapacitanceCurve,
	of: { readonly product: number; readonly basisHash: string }
): Promise<BandPoint[]> {
	const { temperatureCelsius, frequency, unitScale } = curve;
	const stored = await findDistributions(db, {
		...of,
		characteristic: CAPACITANCE.characteristic,
		temperatureCelsius,
		interpolated: 'all'
	});
	const between = stored.flatMap(({ condition, distribution }) =>
		condition.frequency === frequency && distribution.interpolated
			? [{ bias: condition.reverseVoltage ?? 0, distribution }]
			: []
	);
	const inUnit = (si: number) => Number((si / unitScale).toPrecision(6));
	const orNull = (si: number | null) => (si === null ? null : inUnit(si));
	return smoothBand(curve.rows, between).map(({ bias, minimum, typical, maximum }) => ({
		bias,
		minimum: orNull(minimum),
		typical: inUnit(typical),
		maximum: orNull(maximum)
	}));
}
