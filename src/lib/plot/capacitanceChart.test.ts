import { describe, expect, it } from 'vitest';
import { compile } from 'vega-lite';
import { capacitanceChart, leftOutOfChart } from './capacitanceChart';
import type { CapacitancePoint } from './capacitancePoint';
import { printTheme, screenTheme } from './chartTheme';

const point = (
	bias: number,
	minimum: number | null,
	typical: number,
	maximum: number | null
): CapacitancePoint => ({ bias, minimum, typical, maximum, basis: 'characterized' });

const POINTS = [point(0, 36, 40, 44), point(1, 23.5, 25, 26.6), point(4, 10.9, 11.8, 12.7)];

/** Every object of a specification that has a key, wherever it stands. */
function having(value: unknown, key: string): Record<string, unknown>[] {
	if (Array.isArray(value)) return value.flatMap((each) => having(each, key));
	if (typeof value !== 'object' || value === null) return [];
	const entries = value as Record<string, unknown>;
	return [
		...(key in entries ? [entries] : []),
		...Object.values(entries).flatMap((each) => having(each, key))
	];
}

describe('the capacitance chart', () => {
	it('compiles without a warning, on paper and on a screen', () => {
		const said: unknown[] = [];
		const logger = {
			level: () => logger,
			info: () => logger,
			debug: () => logger,
			warn: (...words: unknown[]) => (said.push(words), logger),
			error: (...words: unknown[]) => (said.push(words), logger)
		};
		for (const theme of [printTheme, screenTheme('dark', { width: 340, height: 380 })]) {
			const specification = capacitanceChart({ unit: 'pF', points: POINTS }, theme);
			if (specification === null) throw new Error('expected a chart');
			compile(specification, { logger });
		}
		expect(said).toEqual([]);
	});

	it('tells typical, minimum and maximum by dashes', () => {
		const specification = capacitanceChart({ unit: 'pF', points: POINTS }, printTheme);
		const dashes = having(specification, 'strokeDash').map(({ strokeDash }) => strokeDash);
		expect(dashes).toContainEqual([7, 2.4]);
		expect(dashes).toContainEqual([2.2, 1.6]);
	});

	it('begins at the first positive bias and ends at a whole digit', () => {
		const specification = capacitanceChart({ unit: 'pF', points: POINTS }, printTheme);
		const domains = having(specification, 'domain')
			.map(({ domain }) => domain)
			.filter(Array.isArray);
		expect(domains).toContainEqual([1, 4]);
		const longer = [...POINTS, point(28, 1.91, 2.05, 2.21)];
		expect(
			having(capacitanceChart({ unit: 'pF', points: longer }, printTheme), 'domain').map(
				({ domain }) => domain
			)
		).toContainEqual([1, 30]);
	});

	it('states each limit as a deviation from its own typical value', () => {
		const specification = capacitanceChart({ unit: 'pF', points: POINTS }, printTheme);
		const [row] = having(specification, 'below');
		// (23.5 / 25 − 1) · 100 and (26.6 / 25 − 1) · 100 by hand.
		expect(row?.['below']).toBeCloseTo(-6, 10);
		expect(row?.['above']).toBeCloseTo(6.4, 10);
	});

	it('calls preliminary limits provisional', () => {
		const words = (isProvisional: boolean) =>
			having(
				capacitanceChart({ unit: 'pF', points: POINTS, isProvisional }, printTheme),
				'text'
			).map(({ text }) => text);
		expect(words(false)).toContain('maximum, guaranteed');
		expect(words(true)).toContain('maximum, provisional');
		expect(words(true)).not.toContain('maximum, guaranteed');
	});

	it.each([
		['no rows', []],
		['one row', [point(4, 1, 2, 3)]],
		['one positive bias beside zero', [point(0, 1, 2, 3), point(4, 1, 2, 3)]]
	])('is none for %s', (_, points) => {
		expect(capacitanceChart({ unit: 'pF', points }, printTheme)).toBeNull();
	});

	it('keeps rows without limits as typical values only', () => {
		const points = [point(1, null, 25, null), point(4, null, 11.8, null)];
		const specification = capacitanceChart({ unit: 'pF', points }, printTheme);
		expect(having(specification, 'below').map(({ below }) => below)).toEqual([null, null]);
		expect(JSON.stringify(specification)).not.toContain('guaranteed"');
	});

	it('reads the values at the pointer on a screen, never on paper', () => {
		const screen = screenTheme('light', { width: 700, height: 480 });
		const reading = (theme: typeof printTheme) =>
			having(capacitanceChart({ unit: 'pF', points: POINTS }, theme), 'select').length;
		expect([reading(printTheme), reading(screen)]).toEqual([0, 1]);
	});
});

describe('what the caption must add', () => {
	it('names the rows without a place on the axis', () => {
		expect(leftOutOfChart(POINTS)).toBe(
			'The logarithmic axis begins at the first positive bias; 0\u00a0V: see the table.'
		);
	});

	it('adds nothing when all rows have one', () => {
		expect(leftOutOfChart(POINTS.slice(1))).toBeNull();
	});
});
