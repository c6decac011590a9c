import { capacitanceRatio } from '../junction/derivedQuantities';
import type { BiasColumn } from './conditionColumns';
import type { DerivedColumn } from './derivedColumn';

/**
 * C(V_1)/C(V_2) of each device that was measured at both biases: of one device, never of two
 * distributions or two limits, whose spreads would be added although they go together.
 */
export function derivedRatio(low: BiasColumn, high: BiasColumn): DerivedColumn {
	return {
		values: low.values.map((atLow, device) => {
			const atHigh = high.values[device] ?? Number.NaN;
			return Number.isNaN(atLow) || Number.isNaN(atHigh)
				? Number.NaN
				: capacitanceRatio(atLow, atHigh);
		}),
		sets: [...new Set([...low.sets, ...high.sets])].sort((a, b) => a - b)
	};
}
