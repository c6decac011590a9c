import { adaptedPrimaries, BRADFORD_D65_TO_D50, D50, type Matrix } from './sRgbPrimaries';

/**
 * An ICC profile of the colour space sRGB (IEC 61966-2-1), written from its defining values: three
 * colorants, a white point, and the transfer curve as a formula. Version 4.2 of the format
 * (ICC.1:2004-10), which ISO 32000-1, 8.6.5.5 names for PDF 1.7.
 *
 * The bytes depend on nothing: no date but a fixed one, no profile id.
 */
export function sRgbProfile(): Uint8Array {
	const curve = transferCurve();
	const [red, green, blue] = adaptedPrimaries();
	const tags: readonly (readonly [string, Uint8Array])[] = [
		['desc', localizedText('sRGB IEC 61966-2-1')],
		['cprt', localizedText('No copyright: written from the values of IEC 61966-2-1')],
		['wtpt', xyz(D50)],
		['chad', fixedArray(BRADFORD_D65_TO_D50)],
		['rXYZ', xyz(red)],
		['gXYZ', xyz(green)],
		['bXYZ', xyz(blue)],
		['rTRC', curve],
		['gTRC', curve],
		['bTRC', curve]
	];
	return assemble(tags);
}

const HEADER_LENGTH = 128;

/** Header, tag table, and each tag's data once, on multiples of four (ICC.1:2004-10, 7.2 and 7.3). */
function assemble(tags: readonly (readonly [string, Uint8Array])[]): Uint8Array {
	const offsets = new Map<Uint8Array, number>();
	let end = HEADER_LENGTH + 4 + tags.length * 12;
	for (const [, data] of tags) {
		if (offsets.has(data)) continue;
		offsets.set(data, end);
		end += data.length;
	}
	const bytes = new Uint8Array(end);
	const view = new DataView(bytes.buffer);
	writeHeader(bytes, view);
	view.setUint32(HEADER_LENGTH, tags.length);
	tags.forEach(([signature, data], at) => {
		const entry = HEADER_LENGTH + 4 + at * 12;
		const offset = offsets.get(data) ?? 0;
		bytes.set(ascii(signature), entry);
		view.setUint32(entry + 4, offset);
		view.setUint32(entry + 8, data.length);
		bytes.set(data, offset);
	});
	return bytes;
}

function writeHeader(bytes: Uint8Array, view: DataView): void {
	view.setUint32(0, bytes.length);
	view.setUint32(8, 0x0420_0000);
	bytes.set(ascii('mntrRGB XYZ '), 12);
	// 1 January 2026: the profile says the same on any day.
	[2026, 1, 1, 0, 0, 0].forEach((part, at) => view.setUint16(24 + at * 2, part));
	bytes.set(ascii('acsp'), 36);
	// Media-relative intent is 1, of the illuminant D50.
	view.setUint32(64, 1);
	D50.forEach((part, at) => view.setInt32(68 + at * 4, fixed(part)));
}

/** A number as ICC writes it: 16 bits before the point and 16 behind. */
const fixed = (value: number) => Math.round(value * 65536);

const ascii = (text: string) => new TextEncoder().encode(text);

/** A tag's data: signature of its type, four zeros, what it holds, filled up to a multiple of four. */
function element(type: string, length: number, write: (view: DataView) => void): Uint8Array {
	const bytes = new Uint8Array(Math.ceil((8 + length) / 4) * 4);
	bytes.set(ascii(type), 0);
	write(new DataView(bytes.buffer, 8));
	return bytes;
}

const xyz = (value: readonly number[]) =>
	element('XYZ ', 12, (view) => value.forEach((part, at) => view.setInt32(at * 4, fixed(part))));

const fixedArray = (matrix: Matrix) =>
	element('sf32', 36, (view) =>
		matrix.flat().forEach((part, at) => view.setInt32(at * 4, fixed(part)))
	);

/** One record of English text in UTF-16 (ICC.1:2004-10, 10.13). */
const localizedText = (text: string) =>
	element('mluc', 20 + text.length * 2, (view) => {
		view.setUint32(0, 1);
		view.setUint32(4, 12);
		[...'enUS'].forEach((letter, at) => view.setUint8(8 + at, letter.charCodeAt(0)));
		view.setUint32(12, text.length * 2);
		view.setUint32(16, 28);
		[...text].forEach((letter, at) => view.setUint16(20 + at * 2, letter.charCodeAt(0)));
	});

/**
 * Linear light of a signal (IEC 61966-2-1, 5.2): ((V + 0.055) / 1.055)^2.4 from 0.04045 on, V / 12.92
 * below; as the parametric curve of type 3 (ICC.1:2004-10, 10.15).
 */
const transferCurve = () =>
	element('para', 24, (view) => {
		view.setUint16(0, 3);
		[2.4, 1 / 1.055, 0.055 / 1.055, 1 / 12.92, 0.04045].forEach((part, at) =>
			view.setInt32(4 + at * 4, fixed(part))
		);
	});
