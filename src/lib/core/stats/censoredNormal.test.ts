import fc from 'fast-check';
import { expect, it } from 'vitest';
import {
	censoredFitOfSums,
	censoredMaximum,
	censoredMaximumOfSums,
	censoredMinimum,
	censoredMinimumOfSums,
	censoredNormalFit
} from './censoredNormal';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import { groupSums } from './groupSums';
import { mean } from './mean';
import { standardDeviation } from './standardDeviation';
import { oneSidedToleranceFactor } from './toleranceFactor';

const EXACT = [1.2, 0.7, 2.1, 1.9, 0.4, 1.1, 1.6, 0.9, 2.4, 1.3];
const UNCENSORED = { exact: EXACT, atMost: [], atLeast: [] };
const AT_FLOOR = { exact: EXACT, atMost: [0.3, 0.3, 0.3], atLeast: [] };
const AT_CLAMP = { exact: EXACT, atMost: [], atLeast: [2.5, 2.5] };
const PROMISE = { content: 0.99, confidence: 0.95 };

// R survival 3: survreg(Surv(…, type = "interval2") ~ 1, dist = "gaussian")
it.each([
	['uncensored', UNCENSORED, 1.36, 0.603655530855, -9.141869764065],
	['at a floor', AT_FLOOR, 1.003269781861, 0.861704143675, -15.733678665461],
	['at a clamp', AT_CLAMP, 1.618839407914, 0.812081846258, -14.325931165029]
])('fits readings %s like R', (_, sample, centre, deviation, logLikelihood) => {
	const fit = censoredNormalFit(sample);
	expect(fit.mean).toBeCloseTo(centre, 7);
	expect(fit.standardDeviation).toBeCloseTo(deviation, 7);
	expect(fit.logLikelihood).toBeCloseTo(logLikelihood, 9);
});

it('is the exact tolerance limit when nothing is censored', () => {
	const factor = oneSidedToleranceFactor(EXACT.length, PROMISE);
	const reach = factor * standardDeviation(EXACT);
	expect(censoredMaximum(UNCENSORED, PROMISE)).toBeCloseTo(mean(EXACT) + reach, 8);
	expect(censoredMinimum(UNCENSORED, PROMISE)).toBeCloseTo(mean(EXACT) - reach, 8);
});

it('lets a clamp loosen the maximum, and a floor the minimum', () => {
	expect(censoredMaximum(AT_CLAMP, PROMISE)).toBeGreaterThan(censoredMaximum(UNCENSORED, PROMISE));
	expect(censoredMinimum(AT_FLOOR, PROMISE)).toBeLessThan(censoredMinimum(UNCENSORED, PROMISE));
});

it('follows the scale of the readings', () => {
	const scaled = {
		exact: EXACT.map((y) => 1e-9 * y - 3),
		atMost: [],
		atLeast: [2.5, 2.5].map((y) => 1e-9 * y - 3)
	};
	const limit = censoredMaximum(AT_CLAMP, PROMISE);
	expect((censoredMaximum(scaled, PROMISE) + 3) / (1e-9 * limit)).toBeCloseTo(1, 6);
});

it('refuses two exact readings, and readings without spread', () => {
	const few = { exact: [1, 2], atMost: [], atLeast: [3, 3] };
	expect(() => censoredNormalFit(few)).toThrow(SampleTooSmallError);
	expect(() => censoredMaximum(few, PROMISE)).toThrow(SampleTooSmallError);
	const still = { exact: [1, 1, 1], atMost: [0.5], atLeast: [] };
	expect(() => censoredNormalFit(still)).toThrow(OutsideDomainError);
});

it('needs only sums and counts of the readings, to 1 part in 10¹⁰', () => {
	const reading = fc.double({ min: -3, max: 3, noNaN: true });
	fc.assert(
		fc.property(
			fc.array(reading, { minLength: 5, maxLength: 40 }),
			fc.integer({ min: 0, max: 8 }),
			fc.integer({ min: 0, max: 8 }),
			(exact, below, above) => {
				fc.pre(standardDeviation(exact) > 0.3);
				const [floor, ceiling] = [Math.min(...exact) - 0.1, Math.max(...exact) + 0.1];
				const sample = {
					exact,
					atMost: new Array<number>(below).fill(floor),
					atLeast: new Array<number>(above).fill(ceiling)
				};
				const sums = {
					observed: groupSums(exact),
					atMost: [{ count: below, bound: floor }],
					atLeast: [{ count: above, bound: ceiling }]
				};
				const [fit, fitOfSums] = [censoredNormalFit(sample), censoredFitOfSums(sums)];
				expect(fitOfSums.mean).toBeCloseTo(fit.mean, 10);
				expect(fitOfSums.standardDeviation / fit.standardDeviation).toBeCloseTo(1, 10);
				expect(fitOfSums.logLikelihood).toBeCloseTo(fit.logLikelihood, 9);
				const highest = censoredMaximum(sample, PROMISE);
				expect(censoredMaximumOfSums(sums, PROMISE) / highest).toBeCloseTo(1, 10);
				const lowest = censoredMinimum(sample, PROMISE);
				expect(censoredMinimumOfSums(sums, PROMISE) / lowest).toBeCloseTo(1, 10);
			}
		),
		{ numRuns: 60 }
	);
});
