import { compile } from 'vega-lite';
import { describe, expect, it } from 'vitest';
import { bandChart, type BandChartData } from './bandChart';
import { screenTheme } from './chartTheme';
import { placeApart } from './placeApart';
import { reciprocalSquareChart, reciprocalSquareFrame, xOf } from './reciprocalSquareChart';

const theme = screenTheme('dark', { width: 640, height: 500 });
const band = [0, 1, 2, 4].map((bias) => ({
	bias,
	minimum: 18 / (1 + bias),
	typical: 20 / (1 + bias),
	maximum: 22 / (1 + bias)
}));
const data = (axes: BandChartData['axes']): BandChartData => ({
	unit: 'pF',
	rows: band.map((point) => ({ ...point, basis: 'characterized' as const })),
	band,
	sweeps: [
		{
			name: 'A',
			isOutside: true,
			readings: [
				{ bias: 0, capacitance: 23 },
				{ bias: 1, capacitance: 11 }
			]
		}
	],
	axes
});

/** Everything that stands under a key, anywhere in a specification. */
function under(value: unknown, key: string): unknown[] {
	if (Array.isArray(value)) return value.flatMap((each: unknown) => under(each, key));
	if (typeof value !== 'object' || value === null) return [];
	return Object.entries(value).flatMap(([name, of]: [string, unknown]) => [
		...(name === key ? [of] : []),
		...under(of, key)
	]);
}

describe('the chart of a band', () => {
	it.each([
		['log', 'log', [1, 4]],
		['linear', 'log', [0, 4]],
		['log', 'linear', [1, 4]],
		['linear', 'linear', [0, 4]]
	] as const)('has %s bias over %s capacitance', (bias, capacitance, domain) => {
		const specification = bandChart(data({ bias, capacitance }), theme);
		if (specification === null) throw new Error('expected a chart');
		const scales = under(specification, 'scale');
		expect(scales).toContainEqual({
			type: bias,
			domain: [...domain],
			nice: false,
			...(bias === 'linear' && { zero: false })
		});
		expect(scales).toContainEqual(expect.objectContaining({ type: capacitance }));
		expect(() => compile(specification)).not.toThrow();
	});

	it('draws the sweeps over the band and under the limits', () => {
		const specification = bandChart(data({ bias: 'linear', capacitance: 'log' }), theme);
		const [upper] = under(specification, 'layer') as Record<string, unknown>[][];
		const kinds = (upper ?? []).map(
			(layer) => layer['name'] ?? (layer['mark'] as { type: string }).type
		);
		expect(kinds.slice(0, 3)).toEqual(['area', 'capacitance-outside', 'line']);
	});

	it('draws a sweep as deviation from the median, too', () => {
		const specification = bandChart(data({ bias: 'linear', capacitance: 'log' }), theme);
		// 23/20 − 1 and 11/10 − 1.
		const values = JSON.stringify(under(specification, 'values'));
		expect(values).toMatch(/"bias":0,"value":14\.99|"bias":0,"value":15/);
		expect(values).toMatch(/"bias":1,"value":10/);
	});

	it('is none with one bias on the axis', () => {
		const one = { ...data({ bias: 'log', capacitance: 'log' }), band: band.slice(0, 2) };
		expect(bandChart(one, theme)).toBeNull();
	});
});

describe('labels at the ends of curves', () => {
	it('stand apart, and inside', () => {
		expect(placeApart([10, 12, 60], 10, 100)).toEqual([10, 20, 60]);
		expect(placeApart([95, 96, 99], 10, 100)).toEqual([80, 90, 100]);
	});
});

describe('the 1/C² plot', () => {
	const median = {
		name: 'median',
		points: [0, 1, 2, 3].map((bias) => ({ bias, inverseSquare: (1 + bias) * 1e22 }))
	};
	const line = { slope: 1e22, intercept: 1e22 };

	it('begins where the line meets zero and puts a bias at its place', () => {
		const frame = reciprocalSquareFrame({ median, line }, theme);
		// Two per cent of the 4 V from −1 V to 3 V stand free at the left.
		expect(frame.domain[0]).toBeCloseTo(-1.08, 10);
		expect(frame.domain[1]).toBe(3);
		expect(xOf(frame, 0.96)).toBeCloseTo(frame.width / 2, 10);
	});

	it('shades the window and draws the line from zero, in powers of ten of pF⁻²', () => {
		const specification = reciprocalSquareChart({ median, lots: [], window: [1, 3], line }, theme);
		const rows = under(specification, 'values').flat();
		expect(rows).toContainEqual({ bias: 1, end: 3 });
		// 4 × 10²² F⁻² at 3 V is 0.04 pF⁻²: 4 in 10⁻² pF⁻².
		expect(rows).toContainEqual({ bias: 3, value: expect.closeTo(4, 10) as number });
		expect(rows).toContainEqual({ bias: -1, value: 0 });
		expect(JSON.stringify(specification)).toContain('10⁻²');
		expect(() => compile(specification)).not.toThrow();
	});
});
