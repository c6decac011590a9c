import { describe, expect, it } from 'vitest';
import { limitMarks, roundTicks, valueScale, type Spread } from './spreadFigure';

const spread: Spread = {
	bars: [],
	lots: [
		{ name: 'A', sampleSize: 3, lowest: 11, centre: 12, highest: 13, deviationPercent: 0 },
		{ name: 'B', sampleSize: 3, lowest: 12, centre: 13, highest: 15, deviationPercent: 1 }
	],
	betweenPercent: null,
	withinPercent: null
};
const limits = { minimum: 10, typical: 12.5, maximum: 15 };

describe('the scale', () => {
	const scale = valueScale(spread, limits, { left: 20, right: 320 });

	it('shows every device and limit, with air on both sides', () => {
		expect([scale.lowest, scale.highest]).toEqual([9.7, 15.3]);
		expect([scale.at(9.7), scale.at(15.3)]).toEqual([20, 320]);
	});

	it('has round ticks within it', () => {
		expect(roundTicks(scale)).toEqual([10, 11, 12, 13, 14, 15]);
	});

	it('does not collapse when all devices are alike', () => {
		const lots = [{ ...spread.lots[0]!, lowest: 12, highest: 12 }];
		const nothing = { minimum: null, typical: 12, maximum: null };
		const alike = valueScale({ ...spread, lots }, nothing, { left: 0, right: 100 });
		expect(alike.at(12)).toBeCloseTo(50, 9);
	});
});

describe('the labels of the limits', () => {
	const place = { gap: 60, width: 320 };

	it('stand at their lines where there is room', () => {
		const scale = valueScale(spread, limits, { left: 20, right: 300 });
		for (const mark of limitMarks(limits, scale, place).slice(0, 2)) {
			expect(mark.labelX).toBeCloseTo(mark.x, 9);
		}
	});

	it('part where two lines stand close together', () => {
		const close = { minimum: 12.4, typical: 12.5, maximum: 12.6 };
		const scale = valueScale(spread, close, { left: 20, right: 300 });
		const [min, typ, max] = limitMarks(close, scale, place);
		expect((typ?.labelX ?? 0) - (min?.labelX ?? 0)).toBeGreaterThanOrEqual(60);
		expect((max?.labelX ?? 0) - (typ?.labelX ?? 0)).toBeGreaterThanOrEqual(60);
	});

	it('are not cut at the edges', () => {
		const scale = valueScale(spread, limits, { left: 0, right: 320 });
		const [min, , max] = limitMarks(limits, scale, place);
		expect(min?.labelX).toBeGreaterThanOrEqual(30);
		expect(max?.labelX).toBeLessThanOrEqual(290);
	});

	it('leave out what is not printed', () => {
		const scale = valueScale(spread, limits, { left: 0, right: 320 });
		const only = limitMarks({ minimum: null, typical: 12.5, maximum: null }, scale, place);
		expect(only.map((mark) => mark.kind)).toEqual(['typ']);
	});
});
