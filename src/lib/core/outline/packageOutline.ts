import { z } from 'zod';
import { letterSymbol, symbolText } from '../characteristics/symbol';

/** How a package is built, which decides what its drawing looks like and which letters it needs. */
export const OUTLINE_SHAPES = ['gull-two', 'gull-three', 'c-bend', 'chip'] as const;
export const outlineShape = z.enum(OUTLINE_SHAPES);
export type OutlineShape = z.infer<typeof outlineShape>;

/** A length in mm as it is printed: digits kept. */
const millimetres = z.string().regex(/^\d{1,2}(\.\d{1,3})?$/, 'expected millimetres like 1.25');

export const dimension = z.object({
	symbol: letterSymbol,
	name: z.string().min(1),
	minimum: millimetres.nullable(),
	nominal: millimetres,
	maximum: millimetres.nullable()
});
export type Dimension = z.infer<typeof dimension>;

/** A dimension of the pattern to solder to; it has a nominal value only. */
export const landDimension = dimension.pick({ symbol: true, name: true, nominal: true });
export type LandDimension = z.infer<typeof landDimension>;

/** A package as parameters: drawings are made from its nominal dimensions. */
export interface PackageOutline {
	readonly name: string;
	readonly shape: OutlineShape;
	readonly dimensions: readonly Dimension[];
	readonly land: readonly LandDimension[];
	/** Where the dimensions are from, and what of that is from memory. */
	readonly source: string;
}

/** A drawing that needs a dimension its package doesn't state. */
export class MissingDimensionError extends Error {
	override readonly name = 'MissingDimensionError';

	constructor(readonly letter: string) {
		super(`the drawing requires the dimension ${letter}, got none`);
	}
}

/** Nominal size in mm by letter: `H_E`. */
export type Sizes = (letter: string) => number;

/**
 * The nominal sizes of dimensions, by letter.
 *
 * @throws {MissingDimensionError} when asked for a letter that isn't there
 */
export function nominalSizes(dimensions: readonly Pick<Dimension, 'symbol' | 'nominal'>[]): Sizes {
	const sizes = new Map(dimensions.map(({ symbol, nominal }) => [symbolText(symbol), nominal]));
	return (letter) => {
		const nominal = sizes.get(letter);
		if (nominal === undefined) throw new MissingDimensionError(letter);
		return Number(nominal);
	};
}
