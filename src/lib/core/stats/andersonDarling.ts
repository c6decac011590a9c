import { SampleTooSmallError, OutsideDomainError } from './errors';
import { mean } from './mean';
import { sortNumbers } from './sortNumbers';
import { standardDeviation } from './standardDeviation';
import { tabulatedLogTail } from './tabulatedLogTail';

export interface AndersonDarling {
	/** A², the weighted distance of the sample from a normal population. */
	readonly statistic: number;
	/** A²(1 + 0.75/n + 2.25/n²), comparable between sample sizes. */
	readonly adjusted: number;
	/** Probability of at least as much when the population is normal. */
	readonly pValue: number;
}

/** Fewer values than this have no tabulated distribution. */
const FEWEST = 8;

/** Beyond this the approximation was not fitted; by convention its last value stands for all. */
const FARTHEST = 10;
const SMALLEST = 3.7e-24;

/** The p-value of the adjusted statistic when mean and deviation were estimated. */
export function andersonDarlingPValue(adjusted: number): number {
	const a = adjusted;
	if (a >= FARTHEST) return SMALLEST;
	if (a < 0.2) return 1 - Math.exp(-13.436 + 101.14 * a - 223.73 * a * a);
	if (a < 0.34) return 1 - Math.exp(-8.318 + 42.796 * a - 59.938 * a * a);
	if (a < 0.6) return Math.exp(0.9177 - 4.279 * a - 1.38 * a * a);
	return Math.exp(1.2937 - 5.709 * a + 0.0186 * a * a);
}

/**
 * Anderson and Darling's test of normality, mean and deviation estimated from the sample.
 *
 * Source: D'Agostino and Stephens 1986, Goodness-of-Fit Techniques, section 4.8 and table 4.9.
 *
 * @throws {SampleTooSmallError} for fewer than eight values
 * @throws {OutsideDomainError} for values without spread
 */
export function andersonDarling(values: ArrayLike<number>): AndersonDarling {
	const count = values.length;
	if (count < FEWEST) throw new SampleTooSmallError('andersonDarling', FEWEST, count);
	const centre = mean(values);
	const deviation = standardDeviation(values);
	if (!(deviation > 0)) throw new OutsideDomainError('andersonDarling', 'a spread', deviation);
	const standardized = new Float64Array(count);
	for (let i = 0; i < count; i++) standardized[i] = (values[i]! - centre) / deviation;
	const z = sortNumbers(standardized);
	let sum = 0;
	for (let i = 0; i < count; i++)
		sum += (2 * i + 1) * tabulatedLogTail(z[i]!) + (2 * (count - i) - 1) * tabulatedLogTail(-z[i]!);
	const statistic = -count - sum / count;
	const adjusted = statistic * (1 + 0.75 / count + 2.25 / (count * count));
	return { statistic, adjusted, pValue: andersonDarlingPValue(adjusted) };
}

/**
 * Residuals of the devices about the mean of their own lot, √(n/(n−1)) wider so that small lots
 * spread like large ones. Lots of one device have none. Normality is asked of these: pooled values
 * of lots that differ are not normal even when every lot is.
 */
export function residualsWithinLots(lots: readonly ArrayLike<number>[]): Float64Array {
	const repeated = lots.filter(({ length }) => length > 1);
	const residuals = new Float64Array(repeated.reduce((sum, { length }) => sum + length, 0));
	let filled = 0;
	for (const lot of repeated) {
		const centre = mean(lot);
		const widening = Math.sqrt(lot.length / (lot.length - 1));
		for (let i = 0; i < lot.length; i++) residuals[filled++] = (lot[i]! - centre) * widening;
	}
	return residuals;
}
