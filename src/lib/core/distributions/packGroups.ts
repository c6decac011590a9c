import { PackedGroupsError } from './errors';
import type { Extremes, Group } from './summary';

/*
 * Layout, little endian: 'PGR2' · uint32 groups · uint32 bytes of names · uint32 lowest ·
 * uint32 highest · uint32 0 · per group five float64 (n, mean, sum of squares, lowest, highest) ·
 * the lowest and the highest devices as float64 · names as JSON, [lot, waferLot, wafer] a group.
 * The numbers come before the names, at a multiple of eight bytes, and lose no bit on the way.
 *
 * 'PGR1' was the same without extremes, and its head ended after the bytes of names.
 */
const MAGIC = 0x32524750;
const MAGIC_WITHOUT_EXTREMES = 0x31524750;
const HEAD = 24;
const HEAD_WITHOUT_EXTREMES = 12;
const NUMBERS = 5;

/** What a stored distribution keeps beside its summary. */
export interface PackedParts {
	readonly groups: readonly Group[];
	readonly extremes: Extremes;
}

/** The groups and extremes of a distribution as bytes. */
export function packGroups({ groups, extremes: { lowest, highest } }: PackedParts): Uint8Array {
	const names = new TextEncoder().encode(
		JSON.stringify(groups.map((of) => [of.lot, of.waferLot, of.wafer]))
	);
	const numbers = [
		...groups.flatMap((of) => [of.sampleSize, of.mean, of.sumOfSquares, of.lowest, of.highest]),
		...lowest,
		...highest
	];
	const bytes = new Uint8Array(HEAD + numbers.length * 8 + names.length);
	const view = new DataView(bytes.buffer);
	const head = [MAGIC, groups.length, names.length, lowest.length, highest.length];
	for (const [position, field] of head.entries()) view.setUint32(position * 4, field, true);
	for (const [position, number] of numbers.entries()) {
		view.setFloat64(HEAD + position * 8, number, true);
	}
	bytes.set(names, HEAD + numbers.length * 8);
	return bytes;
}

/**
 * What `packGroups` wrote. Bytes of the older mark have no extremes.
 *
 * @throws {PackedGroupsError} when the bytes are cut short or of another kind
 */
export function unpackGroups(bytes: Uint8Array): PackedParts {
	const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
	const { head, groupCount, nameBytes, lowestCount, highestCount } = readHead(view);
	const numberCount = groupCount * NUMBERS + lowestCount + highestCount;
	const required = head + numberCount * 8 + nameBytes;
	if (bytes.length !== required) {
		throw new PackedGroupsError(`${required} bytes, got ${bytes.length}`);
	}
	const names = parseNames(new TextDecoder().decode(bytes.subarray(required - nameBytes)));
	if (names.length !== groupCount) {
		throw new PackedGroupsError(`${groupCount} names, got ${names.length}`);
	}
	const number = (position: number) => view.getFloat64(head + position * 8, true);
	const numbers = (count: number, from: number) =>
		Array.from({ length: count }, (_, position) => number(from + position));
	return {
		groups: names.map(([lot, waferLot, wafer], position) => ({
			lot,
			waferLot,
			wafer,
			sampleSize: number(position * NUMBERS),
			mean: number(position * NUMBERS + 1),
			sumOfSquares: number(position * NUMBERS + 2),
			lowest: number(position * NUMBERS + 3),
			highest: number(position * NUMBERS + 4)
		})),
		extremes: {
			lowest: numbers(lowestCount, groupCount * NUMBERS),
			highest: numbers(highestCount, groupCount * NUMBERS + lowestCount)
		}
	};
}

function readHead(view: DataView) {
	const field = (position: number) => view.getUint32(position * 4, true);
	const mark = view.byteLength < HEAD_WITHOUT_EXTREMES ? undefined : field(0);
	if (mark === MAGIC_WITHOUT_EXTREMES) {
		return {
			head: HEAD_WITHOUT_EXTREMES,
			groupCount: field(1),
			nameBytes: field(2),
			lowestCount: 0,
			highestCount: 0
		};
	}
	if (mark !== MAGIC || view.byteLength < HEAD) {
		throw new PackedGroupsError('the mark PGR2 or PGR1 at their start');
	}
	return {
		head: HEAD,
		groupCount: field(1),
		nameBytes: field(2),
		lowestCount: field(3),
		highestCount: field(4)
	};
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
