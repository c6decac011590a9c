import fc from 'fast-check';
import { expect, it } from 'vitest';
import { deviceColumns, packFlags, packMatrix, unpackFlags, unpackMatrix } from './blocks';
import { PackedFlagError, PackedMatrixError } from './errors';

it('gives back every value bit by bit, absent ones included', () => {
	fc.assert(
		fc.property(fc.float64Array(), (values) => {
			const back = unpackMatrix(packMatrix(values));
			expect([...back].every((value, i) => Object.is(value, values[i]))).toBe(true);
			expect(back.length).toBe(values.length);
		})
	);
});

// IEEE 754: 1 is 0x3ff0000000000000, −2 is 0xc000000000000000.
it('writes little endian', () => {
	expect([...packMatrix(Float64Array.of(1, -2))]).toEqual([
		0, 0, 0, 0, 0, 0, 0xf0, 0x3f, 0, 0, 0, 0, 0, 0, 0, 0xc0
	]);
});

it('reads from bytes that start anywhere in their buffer', () => {
	const bytes = new Uint8Array(19);
	bytes.set(packMatrix(Float64Array.of(38.917, Number.NaN)), 3);
	expect(unpackMatrix(bytes.subarray(3))).toEqual(Float64Array.of(38.917, Number.NaN));
});

it('refuses bytes that are cut off', () => {
	expect(() => unpackMatrix(new Uint8Array(12))).toThrow(PackedMatrixError);
});

it('refuses device columns of different lengths', () => {
	const columns = { lot: ['A'], wafer: ['1'], site: [''], element: [''], name: [] };
	expect(deviceColumns.safeParse(columns).success).toBe(false);
	expect(deviceColumns.safeParse({ ...columns, name: ['D1'] }).success).toBe(true);
});

it('gives back every censor flag, from bytes that start anywhere', () => {
	fc.assert(
		fc.property(fc.array(fc.constantFrom(-1, 0, 1)), fc.nat(9), (flags, start) => {
			const bytes = new Uint8Array(start + flags.length);
			bytes.set(packFlags(Int8Array.from(flags)), start);
			expect([...unpackFlags(bytes.subarray(start))]).toEqual(flags);
		})
	);
});

// Two's complement: −1 is 0xff.
it('writes a flag as a signed byte, and refuses a byte that is none', () => {
	expect([...packFlags(Int8Array.of(-1, 0, 1))]).toEqual([0xff, 0, 1]);
	expect(() => unpackFlags(Uint8Array.of(0, 2))).toThrow(new PackedFlagError(2));
	expect(() => unpackFlags(Uint8Array.of(0xfe))).toThrow(new PackedFlagError(-2));
});
