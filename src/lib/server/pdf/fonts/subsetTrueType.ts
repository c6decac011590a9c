/** A font file that lacks what a subset needs. */
export class FontFileError extends Error {
	override readonly name = 'FontFileError';
	constructor(readonly missing: string) {
		super(`a TrueType subset requires ${missing}`);
	}
}

interface Table {
	readonly tag: string;
	readonly bytes: Uint8Array;
}

/** Copied whole: the hints call into them. */
const KEPT_WHOLE = ['cvt ', 'fpgm', 'prep'];

/** Flags of a composite glyph's parts (OpenType, `glyf`, component glyph description). */
const WORDS = 0x0001;
const SCALE = 0x0008;
const MORE = 0x0020;
const TWO_SCALES = 0x0040;
const TWO_BY_TWO = 0x0080;

/**
 * A TrueType file with only the given glyphs, numbered in their order; parts of composite glyphs are
 * added at the end. Only the tables that a PDF asks for are written (ISO 32000-1, 9.9).
 *
 * Own code, because the subset of @pdf-lib/fontkit 1.1.1 writes short glyph places without padding
 * glyphs to an even length: faces with glyphs of odd length lose their outlines.
 *
 * @param glyphs numbers in the font; the first must be 0, the missing glyph
 */
export function subsetTrueType(font: Uint8Array, glyphs: readonly number[]): Uint8Array {
	const source = readTables(font);
	const [head, hhea, maxp, hmtx, loca, glyf] = ['head', 'hhea', 'maxp', 'hmtx', 'loca', 'glyf'].map(
		(tag) => need(source, tag)
	) as [DataView, DataView, DataView, DataView, DataView, DataView];
	const isLong = head.getInt16(50) === 1;
	const place = (glyph: number) =>
		isLong ? loca.getUint32(glyph * 4) : loca.getUint16(glyph * 2) * 2;

	const kept = [...glyphs];
	const numbers = new Map(kept.map((glyph, at) => [glyph, at]));
	const outlines: Uint8Array[] = [];
	// Parts of composites are appended while the list is walked.
	for (let at = 0; at < kept.length; at++) {
		const glyph = kept[at] ?? 0;
		const bytes = copyOf(glyf, place(glyph), place(glyph + 1));
		renumberParts(bytes, (part) => {
			const known = numbers.get(part);
			if (known !== undefined) return known;
			numbers.set(part, kept.length);
			return kept.push(part) - 1;
		});
		outlines.push(padded(bytes, 4));
	}

	const newHead = bytesOf(head).slice();
	viewOf(newHead).setInt16(50, 1);
	viewOf(newHead).setUint32(8, 0);
	const newHhea = bytesOf(hhea).slice();
	viewOf(newHhea).setUint16(34, kept.length);
	const newMaxp = bytesOf(maxp).slice();
	viewOf(newMaxp).setUint16(4, kept.length);

	return writeFile([
		...KEPT_WHOLE.flatMap((tag) => {
			const table = source.get(tag);
			return table ? [{ tag, bytes: bytesOf(table) }] : [];
		}),
		{ tag: 'glyf', bytes: concatenate(outlines) },
		{ tag: 'head', bytes: newHead },
		{ tag: 'hhea', bytes: newHhea },
		{ tag: 'hmtx', bytes: metricsOf(kept, hmtx, hhea.getUint16(34)) },
		{ tag: 'loca', bytes: placesOf(outlines) },
		{ tag: 'maxp', bytes: newMaxp }
	]);
}

const viewOf = (bytes: Uint8Array) => new DataView(bytes.buffer, bytes.byteOffset, bytes.length);
const bytesOf = (view: DataView) => new Uint8Array(view.buffer, view.byteOffset, view.byteLength);
const copyOf = (view: DataView, from: number, to: number) => bytesOf(view).slice(from, to);

function readTables(font: Uint8Array): Map<string, DataView> {
	const file = viewOf(font);
	const tables = new Map<string, DataView>();
	for (let at = 0; at < file.getUint16(4); at++) {
		const entry = 12 + at * 16;
		const tag = String.fromCharCode(...font.subarray(entry, entry + 4));
		const [from, length] = [file.getUint32(entry + 8), file.getUint32(entry + 12)];
		tables.set(tag, viewOf(font.subarray(from, from + length)));
	}
	return tables;
}

function need(tables: ReadonlyMap<string, DataView>, tag: string): DataView {
	const table = tables.get(tag);
	if (!table) throw new FontFileError(`table ${tag}`);
	return table;
}

/** Gives the parts of a composite glyph their new numbers, in place. */
function renumberParts(glyph: Uint8Array, numberOf: (part: number) => number): void {
	const view = viewOf(glyph);
	if (glyph.length === 0 || view.getInt16(0) >= 0) return;
	let at = 10;
	let flags = MORE;
	while (flags & MORE) {
		flags = view.getUint16(at);
		view.setUint16(at + 2, numberOf(view.getUint16(at + 2)));
		at += 4 + (flags & WORDS ? 4 : 2);
		if (flags & SCALE) at += 2;
		else if (flags & TWO_SCALES) at += 4;
		else if (flags & TWO_BY_TWO) at += 8;
	}
}

/** Advance and left bearing of each glyph; those past the last advance share it. */
function metricsOf(glyphs: readonly number[], hmtx: DataView, advances: number): Uint8Array {
	const bytes = new Uint8Array(glyphs.length * 4);
	const view = viewOf(bytes);
	glyphs.forEach((glyph, at) => {
		const own = Math.min(glyph, advances - 1);
		view.setUint16(at * 4, hmtx.getUint16(own * 4));
		view.setInt16(
			at * 4 + 2,
			glyph < advances
				? hmtx.getInt16(glyph * 4 + 2)
				: hmtx.getInt16(advances * 4 + (glyph - advances) * 2)
		);
	});
	return bytes;
}

function placesOf(outlines: readonly Uint8Array[]): Uint8Array {
	const bytes = new Uint8Array((outlines.length + 1) * 4);
	const view = viewOf(bytes);
	let place = 0;
	outlines.forEach((outline, at) => {
		view.setUint32(at * 4, place);
		place += outline.length;
	});
	view.setUint32(outlines.length * 4, place);
	return bytes;
}

function padded(bytes: Uint8Array, to: number): Uint8Array {
	const whole = new Uint8Array(Math.ceil(bytes.length / to) * to);
	whole.set(bytes);
	return whole;
}

function concatenate(parts: readonly Uint8Array[]): Uint8Array {
	const whole = new Uint8Array(parts.reduce((sum, { length }) => sum + length, 0));
	let at = 0;
	for (const part of parts) {
		whole.set(part, at);
		at += part.length;
	}
	return whole;
}

/** The file: directory with checksums, then the tables, each on a multiple of four. */
function writeFile(tables: readonly Table[]): Uint8Array {
	const directory = new Uint8Array(12 + tables.length * 16);
	const view = viewOf(directory);
	const exponent = Math.floor(Math.log2(tables.length));
	view.setUint32(0, 0x00010000);
	view.setUint16(4, tables.length);
	view.setUint16(6, 16 * 2 ** exponent);
	view.setUint16(8, exponent);
	view.setUint16(10, 16 * (tables.length - 2 ** exponent));
	let place = directory.length;
	let headPlace = 0;
	const bodies = tables.map(({ tag, bytes }, at) => {
		const entry = 12 + at * 16;
		[...tag].forEach((letter, place) => view.setUint8(entry + place, letter.charCodeAt(0)));
		const body = padded(bytes, 4);
		view.setUint32(entry + 4, checksum(body));
		view.setUint32(entry + 8, place);
		view.setUint32(entry + 12, bytes.length);
		if (tag === 'head') headPlace = place;
		place += body.length;
		return body;
	});
	const file = concatenate([directory, ...bodies]);
	viewOf(file).setUint32(headPlace + 8, (0xb1b0afba - checksum(file)) >>> 0);
	return file;
}

/** Sum of the 32-bit words, modulo 2³² (OpenType, calculating checksums). */
function checksum(bytes: Uint8Array): number {
	const view = viewOf(bytes);
	let sum = 0;
	for (let at = 0; at < bytes.length; at += 4) sum = (sum + view.getUint32(at)) >>> 0;
	return sum;
}
