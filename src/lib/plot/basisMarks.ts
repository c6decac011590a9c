import { BASIS_MARKS, BASIS_WORDS, type Basis } from '../core/limits/basis';
import { fixed, labelLayers, ONE_ROW, type Layer, type Place } from './chartParts';
import type { ChartTheme } from './chartTheme';
import { textWidth } from './textWidth';

/** The shape of each basis: disc, triangle, ring, square; a typical value promises nothing. */
const SHAPES = {
	tested: { shape: 'circle', filled: true },
	'sample-tested': { shape: 'triangle-up', filled: false },
	correlation: { shape: 'circle', filled: false },
	characterized: { shape: 'square', filled: false },
	typical: null
} as const satisfies Record<Basis, { shape: string; filled: boolean } | null>;

const shapeMark = (basis: Basis, diameter: number, theme: ChartTheme) => {
	const drawn = SHAPES[basis];
	return drawn === null
		? null
		: {
				type: 'point' as const,
				shape: drawn.shape,
				size: diameter ** 2,
				filled: true,
				fill: drawn.filled ? theme.ink : theme.paper,
				stroke: theme.ink,
				strokeWidth: theme.frame.width,
				opacity: 1
			};
};

/** A mark at each row of the table, on the named column; one layer a basis. */
export function basisMarkLayers(
	column: string,
	bases: readonly Basis[],
	diameter: number,
	theme: ChartTheme
): Layer[] {
	return bases.flatMap((basis) => {
		const mark = shapeMark(basis, diameter, theme);
		return mark === null
			? []
			: [
					{
						transform: [{ filter: `datum.basis === '${basis}' && datum.${column} !== null` }],
						mark,
						encoding: { y: { field: column, type: 'quantitative' as const } }
					}
				];
	});
}

/** The key of the marks in one line, without a box; letters alone where the words don't fit. */
export function basisKeyLayers(
	bases: readonly Basis[],
	at: Place & { readonly width: number },
	diameter: number,
	theme: ChartTheme
): Layer[] {
	const size = theme.labelSize;
	const words = bases
		.filter((basis) => SHAPES[basis] !== null)
		.map((basis) => `${BASIS_MARKS[basis]} ${BASIS_WORDS[basis]}`);
	const taken = words.reduce((sum, text) => sum + textWidth(text, size) + size * 3, 0);

	let x = at.x;
	return bases.flatMap((basis) => {
		const mark = shapeMark(basis, diameter, theme);
		if (mark === null) return [];
		const text =
			taken <= at.width ? `${BASIS_MARKS[basis]} ${BASIS_WORDS[basis]}` : BASIS_MARKS[basis];
		const left = x;
		x += size * 3 + textWidth(text, size);
		return [
			{ data: ONE_ROW, mark, encoding: fixed({ x: left, y: at.y - size * 0.32 }) },
			...labelLayers(
				[{ text, size, style: 'upright', drop: 0 }],
				{ x: left + size * 0.9, y: at.y, align: 'left' },
				theme.ink
			)
		];
	});
}
