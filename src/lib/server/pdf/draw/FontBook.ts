import { PDFHexString, PDFName, PDFString, type PDFContext, type PDFRef } from 'pdf-lib';
import { FACES, fontFile, fontOf, type Face } from '../fonts/faces';
import { shapeText, type ShapedGlyph } from '../fonts/shapeText';
import { subsetTrueType } from '../fonts/subsetTrueType';
import { RefusalError } from '../../../core/errors';
import { charactersNotInFaces } from '../../../core/messages/print';
import { decimal } from './decimal';

/**
 * A text asked for characters that its face lacks: they would have printed as boxes. Whoever wrote
 * the text can change it, so that the sentence is shown to them.
 */
export class CharacterNotInFaceError extends RefusalError {
	constructor(
		readonly face: Face,
		readonly characters: readonly string[]
	) {
		super(charactersNotInFaces(characters));
	}
}

interface Used {
	/** Name of the font in page resources. */
	readonly name: string;
	readonly ref: PDFRef;
	/** Number in the subset, by the font's own glyph number. */
	readonly numbers: Map<number, number>;
	/** In the order of the subset's numbers, from 1. */
	readonly glyphs: ShapedGlyph[];
}

/** The faces one document uses: collects their glyphs while pages are drawn, then embeds subsets. */
export class FontBook {
	readonly #context: PDFContext;
	readonly #used = new Map<Face, Used>();

	constructor(context: PDFContext) {
		this.#context = context;
	}

	/** Resource name of a face, and its text as an operand of TJ with kerning between the glyphs. */
	encode(face: Face, text: string, kerning = true): { name: string; operand: string } {
		const used = this.#open(face);
		let operand = '[<';
		const { glyphs } = shapeText(face, text, kerning);
		const missing = glyphs.filter(({ id }) => id === 0).map((glyph) => glyph.text);
		if (missing.length > 0) throw new CharacterNotInFaceError(face, missing);
		glyphs.forEach((glyph, at) => {
			operand += numberIn(used, glyph).toString(16).padStart(4, '0');
			if (Math.abs(glyph.adjustment) > 0.05 && at < glyphs.length - 1)
				operand += `>${decimal(-glyph.adjustment)}<`;
		});
		return { name: used.name, operand: `${operand}>]` };
	}

	/** Fonts by resource name, for a page's resources. */
	resources(): Record<string, PDFRef> {
		return Object.fromEntries([...this.#used.values()].map(({ name, ref }) => [name, ref]));
	}

	/** Writes every used face as a subset with widths and a way back to Unicode. */
	embed(): void {
		for (const [face, used] of this.#used) this.#embedFace(face, used);
	}

	#open(face: Face): Used {
		const known = this.#used.get(face);
		if (known) return known;
		const opened: Used = {
			name: `F${FACES.indexOf(face) + 1}`,
			ref: this.#context.nextRef(),
			numbers: new Map(),
			glyphs: []
		};
		this.#used.set(face, opened);
		return opened;
	}

	#embedFace(face: Face, used: Used): void {
		const context = this.#context;
		const font = fontOf(face);
		const scale = 1000 / font.unitsPerEm;
		const { postscriptName } = font;
		const name = PDFName.of(`${subsetTag(face)}+${postscriptName}`);
		const { file: fontBytes, length, unicode: unicodeBytes } = subsetOf(context, face, used.glyphs);
		const packed = { Filter: 'FlateDecode' };
		const file = context.register(context.stream(fontBytes, { ...packed, Length1: length }));
		const { minX, minY, maxX, maxY } = font.bbox;
		const descriptor = context.register(
			context.obj({
				Type: 'FontDescriptor',
				FontName: name,
				Flags: flagsOf(face),
				FontBBox: [minX, minY, maxX, maxY].map((edge) => Math.round(edge * scale)),
				ItalicAngle: font.italicAngle,
				Ascent: Math.round(font.ascent * scale),
				Descent: Math.round(font.descent * scale),
				CapHeight: Math.round(font.capHeight * scale),
				StemV: 80,
				FontFile2: file
			})
		);
		const descendant = context.register(
			context.obj({
				Type: 'Font',
				Subtype: 'CIDFontType2',
				BaseFont: name,
				CIDSystemInfo: {
					Registry: PDFString.of('Adobe'),
					Ordering: PDFString.of('Identity'),
					Supplement: 0
				},
				FontDescriptor: descriptor,
				CIDToGIDMap: 'Identity',
				W: [1, used.glyphs.map(({ advance }) => Number(decimal(advance)))]
			})
		);
		const unicode = context.register(context.stream(unicodeBytes, packed));
		context.assign(
			used.ref,
			context.obj({
				Type: 'Font',
				Subtype: 'Type0',
				BaseFont: name,
				Encoding: 'Identity-H',
				DescendantFonts: [descendant],
				ToUnicode: unicode
			})
		);
	}
}

function numberIn(used: Used, glyph: ShapedGlyph): number {
	const known = used.numbers.get(glyph.id);
	if (known !== undefined) return known;
	const number = used.glyphs.push(glyph);
	used.numbers.set(glyph.id, number);
	return number;
}

/** Six capitals name a subset; one tag a face keeps equal documents equal. */
const subsetTag = (face: Face) => `PLATE${String.fromCharCode(65 + FACES.indexOf(face))}`;

/** Serif 2, symbolic 4 (glyphs are numbered, not encoded), italic 64. */
const flagsOf = (face: Face) =>
	4 + (face.startsWith('slab') ? 2 : 0) + (face.endsWith('Italic') ? 64 : 0);

interface Subset {
	/** Compressed font file, its length before, and its compressed way back to Unicode. */
	readonly file: Uint8Array;
	readonly length: number;
	readonly unicode: Uint8Array;
}

/** Subsets written lately: the proofs of a draft ask for nearly the same glyphs again and again. */
const subsets = new Map<string, Subset>();
const KEPT = 64;

function subsetOf(context: PDFContext, face: Face, glyphs: readonly ShapedGlyph[]): Subset {
	const key = `${face} ${glyphs.map(({ id, text }) => `${id}${text}`).join(' ')}`;
	const known = subsets.get(key);
	if (known) return known;
	const bytes = subsetTrueType(fontFile(face), [0, ...glyphs.map(({ id }) => id)]);
	const made = {
		file: context.flateStream(bytes).contents,
		length: bytes.length,
		unicode: context.flateStream(unicodeMap(glyphs)).contents
	};
	if (subsets.size >= KEPT) subsets.clear();
	subsets.set(key, made);
	return made;
}

/** The CMap from glyph numbers to UTF-16 text, in blocks of at most 100 lines (ISO 32000-1, 9.10.3). */
function unicodeMap(glyphs: readonly ShapedGlyph[]): string {
	const lines = glyphs.map(({ text }, at) => {
		const number = (at + 1).toString(16).padStart(4, '0');
		return `<${number}> ${PDFHexString.fromText(text)
			.toString()
			.replace(/^<FEFF/i, '<')}`;
	});
	const blocks: string[] = [];
	for (let from = 0; from < lines.length; from += 100) {
		const block = lines.slice(from, from + 100);
		blocks.push(`${block.length} beginbfchar\n${block.join('\n')}\nendbfchar`);
	}
	return [
		'/CIDInit /ProcSet findresource begin',
		'12 dict begin',
		'begincmap',
		'/CIDSystemInfo << /Registry (Adobe) /Ordering (UCS) /Supplement 0 >> def',
		'/CMapName /Adobe-Identity-UCS def',
		'/CMapType 2 def',
		'1 begincodespacerange',
		'<0000> <ffff>',
		'endcodespacerange',
		...blocks,
		'endcmap',
		'CMapName currentdict /CMap defineresource pop',
		'end',
		'end'
	].join('\n');
}
