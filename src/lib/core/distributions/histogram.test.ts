import { expect, it } from 'vitest';
import { histogram } from './histogram';

const evenly = [0, 0.25, 0.5, 0.75, 1].map((probability) => ({
	probability,
	value: 10 + 4 * probability
}));

it('spreads devices evenly between quantiles', () => {
	expect(histogram(evenly, 4)).toEqual([
		{ lower: 10, upper: 11, share: 0.25 },
		{ lower: 11, upper: 12, share: 0.25 },
		{ lower: 12, upper: 13, share: 0.25 },
		{ lower: 13, upper: 14, share: 0.25 }
	]);
});

it('shows where they crowd, and loses none', () => {
	const crowded = [
		{ probability: 0, value: 0 },
		{ probability: 0.5, value: 8 },
		{ probability: 0.9, value: 9 },
		{ probability: 1, value: 10 }
	];
	const bars = histogram(crowded, 5);
	expect(bars[4]?.share).toBeCloseTo(0.5, 12);
	expect(bars[0]?.share).toBeCloseTo(0.125, 12);
	expect(bars.reduce((sum, bar) => sum + bar.share, 0)).toBeCloseTo(1, 12);
});

it('counts devices at the very edges', () => {
	const steps = [
		{ probability: 0, value: 1 },
		{ probability: 0.4, value: 1 },
		{ probability: 1, value: 3 }
	];
	const bars = histogram(steps, 2);
	expect(bars.map((bar) => bar.share)).toEqual([0.7, expect.closeTo(0.3, 12)]);
});

it('is one bar where all devices are alike', () => {
	expect(
		histogram(
			[
				{ probability: 0, value: 7 },
				{ probability: 1, value: 7 }
			],
			9
		)
	).toEqual([{ lower: 7, upper: 7, share: 1 }]);
});
