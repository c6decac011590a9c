import { expect, it } from 'vitest';
import { OutsideDomainError, TooFewLotsError } from './errors';
import { normalQuantile } from './normalQuantile';
import { randomSource } from './randomSource';
import { wholeCurveWidening } from './wholeCurve';

/** A curve of equal variances and one correlation, within lots only when `lotShare` is 0. */
function curve(points: number, correlation: number, lotShare: number, lots: number, size: number) {
	const matrix = (variance: number) =>
		Float64Array.from({ length: points * points }, (_, i) =>
			i % (points + 1) === 0 ? variance : variance * correlation
		);
	return {
		ofLotMeans: matrix(lotShare + (1 - lotShare) / size),
		withinLots: matrix(1 - lotShare),
		points,
		lots,
		effectiveSize: size,
		withinDegrees: lots * (size - 1)
	};
}

const OPTIONS = { content: 0.95, confidence: 0.9, sides: 'both' } as const;

it('does not widen points that move as one', () => {
	const { widening } = wholeCurveWidening(curve(4, 1, 0.3, 6, 20), {
		...OPTIONS,
		random: randomSource(1)
	});
	expect(widening).toBeGreaterThanOrEqual(1);
	expect(widening).toBeLessThan(1.02);
});

// Many devices: independent points need the quantile of (1 + P^(1/m))/2 instead of (1 + P)/2
it('widens independent points as the product of their contents asks', () => {
	const points = 5;
	const { widening, standardError } = wholeCurveWidening(curve(points, 0, 0, 100, 400), {
		...OPTIONS,
		random: randomSource(2)
	});
	const exact = normalQuantile((1 + 0.95 ** (1 / points)) / 2) / normalQuantile(0.975);
	expect(Math.abs(widening - exact)).toBeLessThan(4 * standardError + 0.005);
	expect(standardError).toBeLessThan(0.01);
});

it('widens one side likewise, and is repeatable for a seed', () => {
	const options = { ...OPTIONS, sides: 'minimum' } as const;
	const design = curve(5, 0, 0, 100, 400);
	const first = wholeCurveWidening(design, { ...options, random: randomSource(3) });
	const again = wholeCurveWidening(design, { ...options, random: randomSource(3) });
	const exact = normalQuantile(0.95 ** (1 / 5)) / normalQuantile(0.95);
	expect(Math.abs(first.widening - exact)).toBeLessThan(4 * first.standardError + 0.005);
	expect(again).toEqual(first);
	const maximum = { ...options, sides: 'maximum' } as const;
	const other = wholeCurveWidening(design, { ...maximum, random: randomSource(3) });
	expect(Math.abs(other.widening - exact)).toBeLessThan(4 * other.standardError + 0.005);
});

it('is one for a single point', () => {
	expect(
		wholeCurveWidening(curve(1, 0, 0.5, 3, 25), { ...OPTIONS, random: randomSource(4) }).widening
	).toBe(1);
});

it('refuses one lot, matrices that do not fit and a certainty', () => {
	const random = randomSource(5);
	expect(() => wholeCurveWidening(curve(2, 0, 0, 1, 9), { ...OPTIONS, random })).toThrow(
		TooFewLotsError
	);
	const short = { ...curve(2, 0, 0, 3, 9), withinLots: new Float64Array(3) };
	expect(() => wholeCurveWidening(short, { ...OPTIONS, random })).toThrow('2 × 2 values, got 3');
	expect(() =>
		wholeCurveWidening(curve(2, 0, 0, 3, 9), { ...OPTIONS, content: 1, random })
	).toThrow(OutsideDomainError);
});
