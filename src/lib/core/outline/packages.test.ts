import { describe, expect, it } from 'vitest';
import { symbolText } from '../characteristics/symbol';
import { dimension, MissingDimensionError, nominalSizes } from './packageOutline';
import { packageLand, packageViews } from './packageViews';
import { findPackage, PACKAGES } from './packages';

const letters = (of: readonly { readonly symbol: Parameters<typeof symbolText>[0] }[]) =>
	of.map(({ symbol }) => symbolText(symbol));

describe.each(PACKAGES.map((known) => [known.name, known] as const))('%s', (_, known) => {
	const size = nominalSizes(known.dimensions);
	const views = packageViews(known);
	const land = packageLand(known);

	it('states each dimension as minimum ≤ nominal ≤ maximum, in digits that print', () => {
		for (const each of known.dimensions) {
			expect(dimension.parse(each)).toEqual(each);
			expect(Number(each.minimum)).toBeLessThanOrEqual(Number(each.nominal));
			expect(Number(each.nominal)).toBeLessThanOrEqual(Number(each.maximum));
		}
	});

	it('says that its numbers are from memory', () => {
		expect(known.source).toContain('from memory');
	});

	it('draws each dimension of its table once, as long as its nominal size', () => {
		const lines = views.flatMap(({ dimensions }) => dimensions);
		expect(letters(lines).toSorted()).toEqual(letters(known.dimensions).toSorted());
		for (const { symbol, from, to } of lines)
			expect(to - from).toBeCloseTo(size(symbolText(symbol)), 9);
	});

	it('draws each dimension of its land pattern once, as long as its nominal size', () => {
		const sizes = nominalSizes([...known.dimensions, ...known.land]);
		const lines = land?.dimensions ?? [];
		expect(letters(lines)).toEqual(expect.arrayContaining(letters(known.land)));
		for (const { symbol, from, to } of lines)
			expect(to - from).toBeCloseTo(sizes(symbolText(symbol)), 9);
	});

	it('is drawn from above, from the side and from its end, on one seat', () => {
		expect(views.map(({ name }) => name)).toEqual(['top', 'side', 'end']);
		for (const { bounds } of views.slice(1)) {
			expect(bounds.bottom).toBeLessThanOrEqual(0.31);
			expect(-bounds.top).toBeGreaterThanOrEqual(size('A'));
		}
	});

	it('has pads that reach beyond its terminals and are no narrower', () => {
		const pads = land?.shapes.filter(({ name }) => name.startsWith('pad')) ?? [];
		const widthOf = (points: (typeof pads)[number]['points'], axis: 0 | 1) =>
			Math.max(...points.map((point) => point[axis])) -
			Math.min(...points.map((point) => point[axis]));
		const isThree = known.shape === 'gull-three';
		expect(pads).toHaveLength(isThree ? 3 : 2);
		const along = isThree ? 1 : 0;
		const reach = Math.max(...pads.flatMap(({ points }) => points.map((point) => point[along])));
		const length = known.shape === 'chip' ? size('D') : size('H_E');
		expect(reach).toBeGreaterThan(length / 2);
		const lead = known.shape === 'chip' ? size('E') : size('b');
		for (const { points } of pads)
			expect(widthOf(points, along === 0 ? 1 : 0)).toBeGreaterThan(lead);
	});
});

describe('a package', () => {
	it('is found by its name, however it is written', () => {
		expect(findPackage(' sod-323 ')?.name).toBe('SOD-323');
		expect(findPackage('SOD-999')).toBeUndefined();
	});

	it('is refused by its drawing when a dimension is missing', () => {
		const known = PACKAGES[0];
		if (known === undefined) throw new Error('no packages');
		const dimensions = known.dimensions.filter(({ symbol }) => symbolText(symbol) !== 'H_E');
		expect(() => packageViews({ ...known, dimensions })).toThrow(new MissingDimensionError('H_E'));
	});

	it('has the outer distance of its pads from gap and length', () => {
		for (const { land } of PACKAGES.filter(({ shape }) => shape !== 'gull-three')) {
			const size = nominalSizes(land);
			expect(size('Z')).toBeCloseTo(size('G') + 2 * size('Y'), 9);
		}
	});
});
