import { expect, it } from 'vitest';
import { OutsideDomainError, SampleTooSmallError } from './errors';
import { lineFromMoments, regressionLine } from './regressionLine';
import { mean } from './mean';
import { standardDeviation } from './standardDeviation';

const X = [1, 2, 3, 5, 8];
const Y = [2.1, 3.9, 6.2, 9.8, 16.3];

// R 4.2.2: lm(Y ~ X), sigma, cor
it('matches R', () => {
	const line = regressionLine(X, Y);
	expect(line.intercept).toBeCloseTo(-0.0337662337662, 12);
	expect(line.slope).toBeCloseTo(2.0246753246753, 12);
	expect(line.residualDeviation).toBeCloseTo(0.226013829405, 11);
	expect(line.correlation).toBeCloseTo(0.999393676131, 11);
	expect(line.sumOfSquaresX).toBeCloseTo(30.8, 12);
});

it('is the same from the moments of the pairs', () => {
	const direct = regressionLine(X, Y);
	const line = lineFromMoments({
		sampleSize: 5,
		meanX: mean(X),
		meanY: mean(Y),
		deviationX: standardDeviation(X),
		deviationY: standardDeviation(Y),
		correlation: direct.correlation
	});
	expect(line.slope).toBeCloseTo(direct.slope, 12);
	expect(line.intercept).toBeCloseTo(direct.intercept, 12);
	expect(line.residualDeviation).toBeCloseTo(direct.residualDeviation, 10);
});

it('refuses two pairs, lengths that differ, no spread and an impossible correlation', () => {
	expect(() => regressionLine([1, 2], [1, 2])).toThrow(SampleTooSmallError);
	expect(() => regressionLine([1, 2, 3], [1, 2])).toThrow(OutsideDomainError);
	expect(() => regressionLine([1, 1, 1], [1, 2, 3])).toThrow('a spread of x');
	const moments = { sampleSize: 9, meanX: 0, meanY: 0, deviationX: 1, deviationY: 1 };
	expect(() => lineFromMoments({ ...moments, correlation: 1.1 })).toThrow(OutsideDomainError);
	expect(() => lineFromMoments({ ...moments, correlation: 0, deviationX: 0 })).toThrow(
		'a spread of x'
	);
	expect(() => lineFromMoments({ ...moments, correlation: 0, sampleSize: 2 })).toThrow(
		SampleTooSmallError
	);
});
