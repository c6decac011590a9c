import { FACES, fontOf, type Face } from './faces';

/** Running text is set in Source Sans; part number, heads and figures in Roboto Slab as well. */
const FACES_OF = {
	text: ['sans', 'sansItalic', 'sansBold', 'sansBoldItalic'],
	display: FACES
} as const satisfies Record<string, readonly Face[]>;

/** Spaces, line ends and joiners ask for no glyph of their own. */
const SET_OTHERWISE = /[\s\u00ad\u200b\u2060]/u;

/**
 * The characters of a text that the printed faces lack, each once, in order of appearance. A missing
 * glyph would print as a box without a word, so that a text is checked when it is saved.
 *
 * @param use `display` for part numbers, headings and headline figures; `text` for all else
 */
export function findMissingCharacters(text: string, use: keyof typeof FACES_OF = 'text'): string[] {
	const missing = new Set<string>();
	for (const character of text.normalize('NFC')) {
		const codePoint = character.codePointAt(0) ?? 0;
		if (SET_OTHERWISE.test(character)) continue;
		if (!FACES_OF[use].every((face) => fontOf(face).hasGlyphForCodePoint(codePoint)))
			missing.add(character);
	}
	return [...missing];
}
