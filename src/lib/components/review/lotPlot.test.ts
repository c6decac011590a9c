import { expect, it } from 'vitest';
import { commonPrefix, lotPlot, plotText } from './lotPlot';

const lot = {
	lot: 'LK24-011',
	devices: 5,
	lowest: 10,
	lowerQuartile: 11,
	median: 12,
	upperQuartile: 13,
	highest: 16,
	outside: [16]
};

it('places the range of a lot between the printed limits, the largest on top', () => {
	const { marks, minimum, typical, maximum } = lotPlot([lot], {
		minimum: 9,
		typical: 12,
		maximum: 15
	});
	// From 9 to 16 over the height, with 6 % free above and below.
	const y = (value: number) => 0.06 + 0.88 * ((16 - value) / 7);
	expect(minimum).toBeCloseTo(y(9), 12);
	expect(typical).toBeCloseTo(y(12), 12);
	expect(maximum).toBeCloseTo(y(15), 12);
	expect(marks[0]?.x).toBe(0.5);
	expect(marks[0]?.highest).toBeCloseTo(0.06, 12);
	expect(marks[0]?.lowest).toBeCloseTo(y(10), 12);
	expect(marks[0]?.outside[0]).toBeCloseTo(0.06, 12);
});

it('draws no limit that is not printed, and a flat lot in the middle of nothing', () => {
	const flat = { ...lot, lowest: 12, highest: 12, lowerQuartile: 12, upperQuartile: 12 };
	const plot = lotPlot([{ ...flat, outside: [] }], {
		minimum: null,
		typical: null,
		maximum: null
	});
	expect([plot.minimum, plot.typical, plot.maximum]).toEqual([null, null, null]);
	expect(Number.isFinite(plot.marks[0]?.median)).toBe(true);
});

it.each([
	[['LK24-011', 'LK24-014'], 'LK24-'],
	[['LK24-011', 'LK25-014'], ''],
	[['LK24-011'], ''],
	[['A', 'B'], '']
])('%j share %s', (names, prefix) => {
	expect(commonPrefix(names)).toBe(prefix);
});

it('says the plot in words', () => {
	expect(plotText([lot], 'pF')).toBe('LK24-011: 5 devices, 10.00 to 16.00 pF, median 12.00');
});
