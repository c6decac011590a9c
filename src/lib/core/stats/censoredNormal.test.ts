import { expect, it } from 'vitest';
import { censoredMaximum, censoredMinimum, censoredNormalFit } from './censoredNormal';
import { OutsideDomainError, SampleTooSmallError } from './errors';
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
