import { z } from 'zod';
import { EnteredDistributionError } from './errors';
import { transform, type Distribution } from './summary';
import { TRANSFORMS } from './transforms';

/** The numbers of a distribution without its devices, as they are stored. */
export const enteredValues = z.object({
	/** SI unit of the values. */
	unit: z.string(),
	transform,
	/** Devices. */
	n: z.number().int().min(2),
	/** Of transformed values: ln of farad for a capacitance. */
	mean: z.number(),
	/** Of transformed values, divided by n − 1. */
	standardDeviation: z.number().nonnegative()
});

/** What somebody knows of a distribution without its devices. */
export interface EnteredSummary extends z.infer<typeof enteredValues> {
	readonly characteristic: string;
	readonly conditionKey: string;
}

/**
 * A distribution that was entered because only its summary exists. It is marked, and nothing of it
 * can be recomputed: no sets, no lots, no extremes. Its median is the mean turned back, which holds
 * for a symmetric spread of transformed values, as a normal one is.
 *
 * @throws {EnteredDistributionError} unless n is a count of at least two, mean and deviation finite
 *   and the deviation not negative
 */
export function enteredDistribution(entered: EnteredSummary): Distribution {
	const { n, mean, standardDeviation } = entered;
	if (!Number.isInteger(n) || n < 2) throw new EnteredDistributionError('two devices', n);
	if (!Number.isFinite(mean)) throw new EnteredDistributionError('a finite mean', mean);
	if (!(standardDeviation >= 0 && Number.isFinite(standardDeviation))) {
		throw new EnteredDistributionError('a deviation of zero or more', standardDeviation);
	}
	return {
		characteristic: entered.characteristic,
		conditionKey: entered.conditionKey,
		unit: entered.unit,
		transform: entered.transform,
		sampleSize: n,
		independentLots: 0,
		wafers: 0,
		mean,
		standardDeviation,
		skewness: 0,
		quantiles: [{ probability: 0.5, value: TRANSFORMS[entered.transform].invert(mean) }],
		interpolated: false,
		sets: [],
		uncertainty: null,
		excluded: 0,
		quarantined: 0,
		origin: 'entered',
		normality: null,
		components: null,
		groups: [],
		extremes: { lowest: [], highest: [] }
	};
}
