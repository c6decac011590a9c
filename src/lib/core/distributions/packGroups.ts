import { PackedGroupsError } from './errors';
import type { Group } from './summary';

/*
 * Layout, little endian: 'PGR1' · uint32 groups · uint32 bytes of names · per group five float64
 * (n, mean, sum of squares, lowest, highest) · names as JSON, [lot, waferLot, wafer] a group.
 * The numbers come before the names, at a multiple of four bytes, and lose no bit on the way.
 */
const MAGIC = 0x31524750;
const HEAD = 12;
const NUMBERS = 5;

/** The groups of a distribution as bytes. */
export function packGroups(groups: readonly Group[]): Uint8Array {
	const names = new TextEncoder().encode(
		JSON.stringify(groups.map((of) => [of.lot, of.waferLot, of.wafer]))
	);
	const bytes = new Uint8Array(HEAD + groups.length * NUMBERS * 8 + names.length);
	const view = new DataView(bytes.buffer);
	view.setUint32(0, MAGIC, true);
	view.setUint32(4, groups.length, true);
	view.setUint32(8, names.length, true);
	for (const [position, of] of groups.entries()) {
		const numbers = [of.sampleSize, of.mean, of.sumOfSquares, of.lowest, of.highest];
		for (const [index, number] of numbers.entries()) {
			view.setFloat64(HEAD + (position * NUMBERS + index) * 8, number, true);
		}
	}
	bytes.set(names, HEAD + groups.length * NUMBERS * 8);
	return bytes;
}

/**
 * The groups that `packGroups` wrote.
 *
 * @throws {PackedGroupsError} when the bytes are cut short or of another kind
 */
export function unpackGroups(bytes: Uint8Array): Group[] {
	const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
	if (bytes.length < HEAD || view.getUint32(0, true) !== MAGIC) {
		throw new PackedGroupsError('the mark PGR1 at their start');
	}
	const count = view.getUint32(4, true);
	const start = HEAD + count * NUMBERS * 8;
	const required = start + view.getUint32(8, true);
	if (bytes.length !== required) {
		throw new PackedGroupsError(`${required} bytes, got ${bytes.length}`);
	}
	const names = parseNames(new TextDecoder().decode(bytes.subarray(start)));
	if (names.length !== count) {
		throw new PackedGroupsError(`${count} names, got ${names.length}`);
	}
	return names.map(([lot, waferLot, wafer], position) => {
		const number = (index: number) =>
			view.getFloat64(HEAD + (position * NUMBERS + index) * 8, true);
		return {
			lot,
			waferLot,
			wafer,
			sampleSize: number(0),
			mean: number(1),
			sumOfSquares: number(2),
			lowest: number(3),
			highest: number(4)
		};
	});
}

function parseNames(text: string): [string, string, string][] {
	const parsed: unknown = JSON.parse(text);
	if (!Array.isArray(parsed)) throw new PackedGroupsError('a list of names');
	return parsed.map((entry: unknown) => {
		if (!Array.isArray(entry)) throw new PackedGroupsError('three names a group');
		const [lot, waferLot, wafer] = entry as unknown[];
		if (typeof lot !== 'string' || typeof waferLot !== 'string' || typeof wafer !== 'string') {
			throw new PackedGroupsError('three names a group');
		}
		return [lot, waferLot, wafer];
	});
}
