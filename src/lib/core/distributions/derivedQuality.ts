import { qualityFactor } from '../junction/derivedQuantities';
import type { BiasColumn } from './conditionColumns';
import type { DerivedColumn } from './derivedColumn';

/**
 * Q = 1/(2πf·C·r_s) of each device, at the frequency of its series resistance. The capacitance may
 * come from a lower frequency: a depletion capacitance doesn't depend on it. A resistance that is
 * only known to be at most something makes a quality factor of at least something.
 *
 * @param frequency in Hz, at which r_s was read
 */
export function derivedQuality(
	frequency: number,
	capacitance: BiasColumn,
	resistance: DerivedColumn
): DerivedColumn {
	const { values, censored } = resistance;
	return {
		values: capacitance.values.map((farad, device) => {
			const ohm = values[device] ?? Number.NaN;
			return Number.isNaN(farad) || Number.isNaN(ohm)
				? Number.NaN
				: qualityFactor(frequency, farad, ohm);
		}),
		...(censored && { censored: censored.map((says) => (says === 0 ? 0 : -says)) }),
		sets: [...new Set([...capacitance.sets, ...resistance.sets])].sort((a, b) => a - b)
	};
}
