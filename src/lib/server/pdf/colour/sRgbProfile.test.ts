import { describe, expect, it } from 'vitest';
import { adaptedPrimaries, BRADFORD_D65_TO_D50 } from './sRgbPrimaries';
import { sRgbProfile } from './sRgbProfile';

const bytes = sRgbProfile();
const view = new DataView(bytes.buffer);
const text = (at: number, length: number) => new TextDecoder().decode(bytes.slice(at, at + length));

const entries = Array.from({ length: view.getUint32(128) }, (_, at) => {
	const entry = 132 + at * 12;
	return {
		signature: text(entry, 4),
		offset: view.getUint32(entry + 4),
		length: view.getUint32(entry + 8)
	};
});
const offsetOf = (signature: string) =>
	entries.find((entry) => entry.signature === signature)?.offset ?? 0;

describe('the colours', () => {
	// Tags rXYZ, gXYZ and bXYZ of sRGB.icc in Debian's icc-profiles-free 2.0.1, read by a few lines
	// of Python.
	it('have the colorants of another sRGB profile', () => {
		const expected = [
			[0.43585, 0.22238, 0.01392],
			[0.38533, 0.71704, 0.09714],
			[0.14302, 0.06059, 0.71384]
		];
		adaptedPrimaries().forEach((colorant, at) =>
			colorant.forEach((part, axis) => expect(part).toBeCloseTo(expected[at]?.[axis] ?? 0, 3))
		);
	});

	it('add up to the white of the connection space', () => {
		const [red, green, blue] = adaptedPrimaries();
		const sum = red.map((part, at) => part + (green[at] ?? 0) + (blue[at] ?? 0));
		[0.9642, 1, 0.8249].forEach((part, at) => expect(sum[at]).toBeCloseTo(part, 6));
	});

	// The matrix as ICC's own sRGB v4 profile prints it; from memory.
	it('come from D65 by the Bradford matrix', () => {
		const expected = [
			[1.0479, 0.0229, -0.0502],
			[0.0296, 0.9905, -0.0171],
			[-0.0092, 0.0151, 0.7517]
		];
		BRADFORD_D65_TO_D50.forEach((line, at) =>
			line.forEach((part, axis) => expect(part).toBeCloseTo(expected[at]?.[axis] ?? 0, 3))
		);
	});
});

describe('the file', () => {
	it('says what it is in its header', () => {
		expect(view.getUint32(0)).toBe(bytes.length);
		expect(view.getUint32(8)).toBe(0x04200000);
		expect(text(12, 12)).toBe('mntrRGB XYZ ');
		expect(text(36, 4)).toBe('acsp');
		// D50 in s15Fixed16: the three words that the format prints.
		expect([68, 72, 76].map((at) => view.getUint32(at))).toEqual([0xf6d6, 0x10000, 0xd32d]);
	});

	it('has each tag that a display profile needs, inside the file, on multiples of four', () => {
		expect(entries.map(({ signature }) => signature).toSorted()).toEqual(
			['bTRC', 'bXYZ', 'chad', 'cprt', 'desc', 'gTRC', 'gXYZ', 'rTRC', 'rXYZ', 'wtpt'].toSorted()
		);
		for (const { offset, length } of entries) {
			expect(offset % 4).toBe(0);
			expect(offset + length).toBeLessThanOrEqual(bytes.length);
		}
	});

	it('turns signals into light as IEC 61966-2-1 does', () => {
		const at = offsetOf('rTRC');
		expect(text(at, 4)).toBe('para');
		expect(view.getUint16(at + 8)).toBe(3);
		const [g = 0, a = 0, b = 0, c = 0, d = 0] = [0, 1, 2, 3, 4].map(
			(place) => view.getInt32(at + 12 + place * 4) / 65536
		);
		const light = (signal: number) => (signal >= d ? (a * signal + b) ** g : c * signal);
		// Python: ((v + 0.055) / 1.055) ** 2.4 for 0.5 and 102/255; 0.02 / 12.92.
		expect(light(0.5)).toBeCloseTo(0.2140411, 4);
		expect(light(102 / 255)).toBeCloseTo(0.1328683, 4);
		expect(light(0.02)).toBeCloseTo(0.001548, 5);
		expect(light(1)).toBeCloseTo(1, 4);
	});

	it('is small, and the same each time', () => {
		expect(bytes.length).toBeLessThan(800);
		expect(sRgbProfile()).toEqual(bytes);
	});
});
