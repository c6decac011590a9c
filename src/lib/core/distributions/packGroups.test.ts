import fc from 'fast-check';
import { expect, it } from 'vitest';
import { PackedGroupsError } from './errors';
import { packGroups, unpackGroups } from './packGroups';

const group = fc.record({
	lot: fc.string(),
	waferLot: fc.string({ unit: 'grapheme' }),
	wafer: fc.string(),
	sampleSize: fc.integer({ min: 1, max: 1e6 }),
	mean: fc.double({ noNaN: true }),
	sumOfSquares: fc.double({ min: 0, noNaN: true }),
	lowest: fc.double({ noNaN: true }),
	highest: fc.double({ noNaN: true })
});

it('gives every bit back', () => {
	fc.assert(
		fc.property(fc.array(group), (groups) => {
			expect(unpackGroups(packGroups(groups))).toEqual(groups);
		})
	);
});

it('reads bytes that lie at an odd place of a larger buffer', () => {
	const groups = fc.sample(group, { numRuns: 3, seed: 5 });
	const packed = packGroups(groups);
	const larger = new Uint8Array(packed.length + 3);
	larger.set(packed, 3);
	expect(unpackGroups(larger.subarray(3))).toEqual(groups);
});

it('refuses bytes that were cut short', () => {
	const packed = packGroups(fc.sample(group, { numRuns: 2, seed: 1 }));
	expect(() => unpackGroups(packed.subarray(0, packed.length - 1))).toThrow(
		new PackedGroupsError(`${packed.length} bytes, got ${packed.length - 1}`)
	);
});

it('refuses bytes of another kind', () => {
	expect(() => unpackGroups(new TextEncoder().encode('lot,wafer,site\n'))).toThrow(
		new PackedGroupsError('the mark PGR1 at their start')
	);
});
