import fontkit from '@pdf-lib/fontkit';
import { describe, expect, it } from 'vitest';
import { textWidth } from '../../../plot/textWidth';
import { FACES, fontFile, fontOf } from './faces';
import { findMissingCharacters } from './findMissingCharacters';
import { measureText, shapeText } from './shapeText';
import { subsetTrueType } from './subsetTrueType';

describe('a subset of a face', () => {
	const text = 'AVgé−µΩ≤½';

	it.each(FACES)('%s keeps every outline and advance, composites too', (face) => {
		const font = fontOf(face);
		const glyphs = [...text].map((character) =>
			font.glyphForCodePoint(character.codePointAt(0) ?? 0)
		);
		const file = subsetTrueType(fontFile(face), [0, ...glyphs.map(({ id }) => id)]);
		const subset = fontkit.create(file);
		glyphs.forEach((glyph, at) => {
			// A subset file has no cmap; glyphs are taken by number.
			const kept = (subset as unknown as { getGlyph(id: number): typeof glyph }).getGlyph(at + 1);
			expect(kept.path.toSVG()).toBe(glyph.path.toSVG());
			expect(kept.advanceWidth).toBe(glyph.advanceWidth);
			expect(glyph.path.toSVG().length).toBeGreaterThan(20);
		});
		expect(file.length).toBeLessThan(fontFile(face).length / 3);
	});
});

describe('shaping', () => {
	it('kerns running text and leaves columns of numbers alone', () => {
		// GPOS of Roboto Slab 700: L before T is 205 of 2048 units closer.
		const style = { face: 'slabBold', size: 2048 } as const;
		const plain = measureText('LT', { ...style, kerning: false });
		expect(plain - measureText('LT', style)).toBeCloseTo(205, 6);
		expect(measureText('1171', { face: 'sans', size: 8.5, kerning: false })).toBeCloseTo(
			4 * 0.497 * 8.5,
			10
		);
	});

	it('sets word spaces 0.24 of the size wide', () => {
		expect(measureText(' ', { face: 'sans', size: 100 })).toBeCloseTo(24, 10);
	});

	it('gives each glyph the character it was asked for, whatever was asked before', () => {
		shapeText('sans', '\u03bc');
		expect(shapeText('sans', '\u00b5A').glyphs.map(({ text }) => text)).toEqual(['\u00b5', 'A']);
		expect(
			shapeText('sans', 'fi ffl')
				.glyphs.map(({ text }) => text)
				.join('')
		).toBe('fi ffl');
	});

	it('agrees with the width table of the charts', () => {
		const words = 'maximum, guaranteed (median) 0.5 V';
		const shaped = measureText(words, { face: 'sans', size: 10, kerning: false });
		const spaces = words.split(' ').length - 1;
		expect(textWidth(words, 10) + spaces * 0.4).toBeCloseTo(shaped, 10);
	});
});

describe('characters the faces lack', () => {
	it('are none for what the trade writes', () => {
		expect(findMissingCharacters('µ Ω ° ± ≤ ≥ − × · ² ³ φ ε – — α Δ ∞ ≈ … “x” é ß ł ș')).toEqual(
			[]
		);
	});

	it('are named once each, in order', () => {
		expect(findMissingCharacters('二极管 diode 二')).toEqual(['二', '极', '管']);
	});

	it('are more where the slab is used', () => {
		expect(findMissingCharacters('25 °C → 85 °C')).toEqual([]);
		expect(findMissingCharacters('25 °C → 85 °C', 'display')).toEqual(['→']);
	});
});
