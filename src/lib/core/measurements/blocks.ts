import { z } from 'zod';
import { PackedFlagError, PackedMatrixError } from './errors';

/** Devices of a set come in chunks of this many; device index = chunk × CHUNK + row. */
export const CHUNK = 2048;

/** Who the rows of a chunk are: parallel arrays, one entry a device. Empty text = not stated. */
export const deviceColumns = z
	.object({
		lot: z.array(z.string()),
		wafer: z.array(z.string()),
		site: z.array(z.string()),
		element: z.array(z.string()),
		name: z.array(z.string())
	})
	.refine(
		({ lot, wafer, site, element, name }) =>
			[wafer, site, element, name].every(({ length }) => length === lot.length),
		'expected arrays of one length'
	);
export type DeviceColumns = z.infer<typeof deviceColumns>;

const isLittleEndian = new Uint8Array(new Uint16Array([1]).buffer)[0] === 1;

/**
 * A matrix as it is stored: float64, little endian, row by row; NaN = absent.
 */
export function packMatrix(values: Float64Array): Uint8Array {
	const bytes = new Uint8Array(values.length * 8);
	if (isLittleEndian) {
		bytes.set(new Uint8Array(values.buffer, values.byteOffset, values.byteLength));
		return bytes;
	}
	const view = new DataView(bytes.buffer);
	for (const [i, value] of values.entries()) view.setFloat64(i * 8, value, true);
	return bytes;
}

/**
 * What `packMatrix` stored, copied out of the bytes.
 *
 * @throws {PackedMatrixError} when the bytes are no whole number of values
 */
export function unpackMatrix(bytes: Uint8Array): Float64Array {
	if (bytes.byteLength % 8 !== 0) throw new PackedMatrixError(bytes.byteLength);
	const values = new Float64Array(bytes.byteLength / 8);
	if (isLittleEndian) {
		new Uint8Array(values.buffer).set(bytes);
		return values;
	}
	const view = new DataView(bytes.buffer, bytes.byteOffset);
	for (let i = 0; i < values.length; i++) values[i] = view.getFloat64(i * 8, true);
	return values;
}

/** Censor flags as they are stored: one signed byte a device. */
export function packFlags(flags: Int8Array): Uint8Array {
	return new Uint8Array(flags.buffer, flags.byteOffset, flags.byteLength).slice();
}

/**
 * What `packFlags` stored, copied out of the bytes.
 *
 * @throws {PackedFlagError} for a byte that is none of −1, 0 and 1
 */
export function unpackFlags(bytes: Uint8Array): Int8Array {
	const flags = Int8Array.from(bytes);
	const wrong = flags.find((flag) => flag < -1 || flag > 1);
	if (wrong !== undefined) throw new PackedFlagError(wrong);
	return flags;
}
