import { fontOf, type Face } from './faces';

/** A glyph of a run, in thousandths of the size. */
export interface ShapedGlyph {
	readonly id: number;
	/** The characters it stands for: what copying it gives. */
	readonly text: string;
	/** The glyph's own advance. */
	readonly advance: number;
	/** What kerning or the word space adds after it. */
	readonly adjustment: number;
}

export interface ShapedRun {
	readonly glyphs: readonly ShapedGlyph[];
	/** Width with kerning, in thousandths of the size. */
	readonly width: number;
}

/** Word space of the printed sheet, in thousandths of the size. */
const WORD_SPACE = 240;

/** One glyph a character: ligatures would join letters that tracking must keep apart. */
const FEATURES = { liga: false, clig: false, calt: false, kern: true };
const WITHOUT_KERNING = { ...FEATURES, kern: false };

/** Runs already shaped; a sheet repeats most of its words. */
const cache = new Map<string, ShapedRun>();
const CACHE_LIMIT = 20_000;

/** No-break spaces have done their work once lines are broken: they print and copy as plain ones. */
export const plainSpaces = (text: string) => text.replaceAll(/[\u00a0\u202f\u2007\u2009]/g, ' ');

/** Glyphs and kerning of a text in a face. Columns of numbers go without kerning, to stay columns. */
export const shapeText = (face: Face, text: string, kerning = true): ShapedRun =>
	remember(`${face} ${kerning} run ${text}`, () => {
		const glyphs = plainSpaces(text)
			.split(/( )/)
			.filter((part) => part !== '')
			.flatMap((part) => (part === ' ' ? space(face) : shapeWord(face, part, kerning).glyphs));
		return { glyphs, width: widthOf(glyphs) };
	});

function remember(key: string, shape: () => ShapedRun): ShapedRun {
	const known = cache.get(key);
	if (known) return known;
	const shaped = shape();
	if (cache.size >= CACHE_LIMIT) cache.clear();
	cache.set(key, shaped);
	return shaped;
}

/** Width of a text at a size, with kerning and `tracking` (in pt) after each glyph. */
export function measureText(
	text: string,
	style: {
		readonly face: Face;
		readonly size: number;
		readonly kerning?: boolean | undefined;
		readonly tracking?: number | undefined;
	}
): number {
	const { glyphs, width } = shapeText(style.face, text, style.kerning);
	return (width * style.size) / 1000 + glyphs.length * (style.tracking ?? 0);
}

const widthOf = (glyphs: readonly ShapedGlyph[]) =>
	glyphs.reduce((sum, glyph) => sum + glyph.advance + glyph.adjustment, 0);

function space(face: Face): ShapedGlyph {
	const [glyph] = shapeWord(face, ' ', false).glyphs;
	if (!glyph) throw new Error(`${face} has no space`);
	return { ...glyph, adjustment: WORD_SPACE - glyph.advance };
}

const shapeWord = (face: Face, word: string, kerning: boolean): ShapedRun =>
	remember(`${face} ${kerning} word ${word}`, () => {
		const font = fontOf(face);
		const scale = 1000 / font.unitsPerEm;
		const characters = [...word];
		const run = font.layout(word, kerning ? FEATURES : WITHOUT_KERNING);
		// Fontkit's glyphs remember the first characters they were asked for: the text is taken from
		// the word itself, glyph by character. Where a face joins characters they are set singly.
		const glyphs =
			run.glyphs.length === characters.length
				? run.glyphs.map((glyph, at) => ({
						id: glyph.id,
						text: characters[at] ?? '',
						advance: glyph.advanceWidth * scale,
						adjustment:
							((run.positions[at]?.xAdvance ?? glyph.advanceWidth) - glyph.advanceWidth) * scale
					}))
				: characters.map((text) => {
						const glyph = font.glyphForCodePoint(text.codePointAt(0) ?? 0);
						return { id: glyph.id, text, advance: glyph.advanceWidth * scale, adjustment: 0 };
					});
		return { glyphs, width: widthOf(glyphs) };
	});
