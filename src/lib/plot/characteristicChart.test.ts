import { describe, expect, it } from 'vitest';
import { compile } from 'vega-lite';
import {
	characteristicChart,
	describeChart,
	type CharacteristicChartData
} from './characteristicChart';
import { halfPrintTheme } from './chartTheme';

const LEAKAGE: CharacteristicChartData = {
	x: { symbol: { quantity: 'T', subscript: 'j' }, unit: '°C', scale: 'linear' },
	y: { symbol: { quantity: 'I', subscript: 'R' }, unit: 'nA', scale: 'log' },
	curves: [
		{
			label: 'typical, V_R = 30 V',
			points: [
				[-25, 0],
				[25, 1],
				[85, 64],
				[125, 1024]
			],
			isMeasured: true
		},
		{
			label: 'V_R = 10 V',
			points: [
				[25, 0.4],
				[125, 410]
			],
			isMeasured: false
		}
	],
	limits: [{ x: 85, y: 200, side: 'maximum', label: 'max 200 nA' }]
};

interface Drawn {
	readonly layer: readonly {
		readonly data?: { readonly values: readonly object[] };
		readonly mark: Readonly<Record<string, unknown>>;
	}[];
	readonly encoding: Readonly<
		Record<'x' | 'y', { scale: { type: string; domain: number[] }; axis: { values: number[] } }>
	>;
}

function drawn(data: CharacteristicChartData): Drawn {
	const spec = characteristicChart(data, halfPrintTheme);
	if (spec === null) throw new Error('nothing is drawn');
	return spec as unknown as Drawn;
}

const linesOf = ({ layer }: Drawn) => layer.filter(({ mark }) => mark.type === 'line');
const textsOf = ({ layer }: Drawn) =>
	layer.flatMap(({ mark, data }) =>
		mark.type === 'text' ? (data?.values ?? []).map((row) => ('text' in row ? row.text : '')) : []
	);

describe('a chart of a characteristic', () => {
	it('draws each curve through its points; a logarithmic axis has no place for zero', () => {
		expect(linesOf(drawn(LEAKAGE)).map(({ data }) => data?.values)).toEqual([
			[
				{ x: 25, y: 1 },
				{ x: 85, y: 64 },
				{ x: 125, y: 1024 }
			],
			[
				{ x: 25, y: 0.4 },
				{ x: 125, y: 410 }
			]
		]);
	});

	it('covers its points on axes that end at ticks', () => {
		const { x, y } = drawn(LEAKAGE).encoding;
		expect(x.scale).toMatchObject({ type: 'linear', domain: [0, 125] });
		expect(x.axis.values).toEqual([0, 25, 50, 75, 100, 125]);
		expect(y.scale).toMatchObject({ type: 'log', domain: [0.4, 2000] });
	});

	it('dashes what nobody measured, and says so at the line', () => {
		const [measured, computed] = linesOf(drawn(LEAKAGE));
		expect(measured?.mark.strokeDash).toBeUndefined();
		expect(computed?.mark.strokeDash).toEqual([3.2, 2.2]);
		expect(textsOf(drawn(LEAKAGE))).toContain('= 10 V, not measured');
	});

	it('names its axes with symbol and unit', () => {
		const texts = textsOf(drawn(LEAKAGE));
		expect(texts).toEqual(expect.arrayContaining(['I', 'R', 'in nA', 'T', 'j', 'in °C']));
	});

	it('marks a guaranteed value with a bar and an arrow to where the devices lie', () => {
		const { layer } = drawn(LEAKAGE);
		expect(layer.filter(({ mark }) => mark.shape === 'triangle-down')).toHaveLength(1);
		const minimum = drawn({ ...LEAKAGE, limits: [{ x: 85, y: 2, side: 'minimum', label: 'min' }] });
		expect(minimum.layer.filter(({ mark }) => mark.shape === 'triangle-up')).toHaveLength(1);
	});

	it('is nothing without two points on its axes', () => {
		const curves = [
			{
				label: 'x',
				points: [
					[25, 0],
					[85, 1]
				] as [number, number][],
				isMeasured: true
			}
		];
		expect(characteristicChart({ ...LEAKAGE, curves }, halfPrintTheme)).toBeNull();
	});

	it('is understood by the chart library without a warning', () => {
		const said: unknown[] = [];
		const logger = {
			level: () => logger,
			error: (...parts: unknown[]) => (said.push(parts), logger),
			warn: (...parts: unknown[]) => (said.push(parts), logger),
			info: () => logger,
			debug: () => logger
		};
		const spec = characteristicChart(LEAKAGE, halfPrintTheme);
		if (spec === null) throw new Error('nothing is drawn');
		expect(compile(spec, { logger }).spec.marks?.length).toBeGreaterThan(5);
		expect(said).toEqual([]);
	});

	it('says in words what it shows', () => {
		expect(describeChart(LEAKAGE)).toBe(
			'Chart of I_R in nA, logarithmic, against T_j in °C, linear. typical, V_R = 30 V: 0 at -25 to 1024 at 125; V_R = 10 V: 0.4 at 25 to 410 at 125.'
		);
	});
});
