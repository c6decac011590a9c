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

const devices = fc.array(fc.double({ noNaN: true }));
const extremes = fc.record({ lowest: devices, highest: devices });
const parts = fc.record({ groups: fc.array(group, { minLength: 1, maxLength: 9 }), extremes });
const sampled = (seed: number) => fc.sample(parts, { numRuns: 1, seed })[0]!;

it('gives every bit back', () => {
	fc.assert(
		fc.property(fc.array(group), extremes, (groups, outermost) => {
			const written = { groups, extremes: outermost };
			expect(unpackGroups(packGroups(written))).toEqual(written);
		})
	);
});

it('reads the older bytes, which kept no extremes', () => {
	// One group of lot A, wafer lot W, wafer 1: five numbers, then the names, as version 1 wrote it.
	const names = new TextEncoder().encode('[["A","W","1"]]');
	const older = new Uint8Array(12 + 5 * 8 + names.length);
	const view = new DataView(older.buffer);
	older.set(new TextEncoder().encode('PGR1'));
	view.setUint32(4, 1, true);
	view.setUint32(8, names.length, true);
	for (const [at, number] of [25, -24.9, 0.0061, 14.2e-12, 15.8e-12].entries()) {
		view.setFloat64(12 + at * 8, number, true);
	}
	older.set(names, 12 + 5 * 8);
	expect(unpackGroups(older)).toEqual({
		groups: [
			{
				lot: 'A',
				waferLot: 'W',
				wafer: '1',
				sampleSize: 25,
				mean: -24.9,
				sumOfSquares: 0.0061,
				lowest: 14.2e-12,
				highest: 15.8e-12
			}
		],
		extremes: { lowest: [], highest: [] }
	});
});

it('reads bytes that lie at an odd place of a larger buffer', () => {
	const written = sampled(5);
	const packed = packGroups(written);
	const larger = new Uint8Array(packed.length + 3);
	larger.set(packed, 3);
	expect(unpackGroups(larger.subarray(3))).toEqual(written);
});

it('refuses bytes that were cut short', () => {
	const packed = packGroups(sampled(1));
	expect(() => unpackGroups(packed.subarray(0, packed.length - 1))).toThrow(
		new PackedGroupsError(`${packed.length} bytes, got ${packed.length - 1}`)
	);
});

it('refuses bytes of another kind', () => {
	expect(() => unpackGroups(new TextEncoder().encode('lot,wafer,site\n'))).toThrow(
		new PackedGroupsError('the mark PGR2 or PGR1 at their start')
	);
});
