import { z } from 'zod';
import { packMatrix, unpackMatrix } from '../measurements/blocks';
import { PackedJointError } from './errors';
import type { JointDistribution } from './jointDistribution';
import { transform } from './summary';

/*
 * Layout: 'PJD1' · uint32 (little endian) bytes of the head · the head as JSON · float64 little
 * endian: lot means, then covariances within lots.
 */
const MAGIC = 0x31444a50;
const PREFIX = 8;

const head = z.object({
	characteristic: z.string(),
	conditionKey: z.string(),
	unit: z.string(),
	transform,
	biases: z.array(z.number()),
	lotSizes: z.array(z.number().int().positive())
});

/** A joint distribution as bytes, which lose no bit of it. */
export function packJoint({ lotMeans, withinLots, ...rest }: JointDistribution): Uint8Array {
	const text = new TextEncoder().encode(JSON.stringify(rest));
	const means = packMatrix(lotMeans);
	const covariances = packMatrix(withinLots);
	const bytes = new Uint8Array(PREFIX + text.length + means.length + covariances.length);
	const view = new DataView(bytes.buffer);
	view.setUint32(0, MAGIC, true);
	view.setUint32(4, text.length, true);
	bytes.set(text, PREFIX);
	bytes.set(means, PREFIX + text.length);
	bytes.set(covariances, PREFIX + text.length + means.length);
	return bytes;
}

/**
 * The joint distribution that `packJoint` wrote.
 *
 * @throws {PackedJointError} when the bytes are cut short or of another kind
 */
export function unpackJoint(bytes: Uint8Array): JointDistribution {
	const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
	if (bytes.length < PREFIX || view.getUint32(0, true) !== MAGIC) {
		throw new PackedJointError('the mark PJD1 at their start');
	}
	const start = PREFIX + view.getUint32(4, true);
	if (bytes.length < start) throw new PackedJointError(`${start} bytes, got ${bytes.length}`);
	const rest = head.parse(JSON.parse(new TextDecoder().decode(bytes.subarray(PREFIX, start))));
	const points = rest.biases.length;
	const means = start + 8 * rest.lotSizes.length * points;
	const required = means + 8 * points * points;
	if (bytes.length !== required) {
		throw new PackedJointError(`${required} bytes, got ${bytes.length}`);
	}
	return {
		...rest,
		lotMeans: unpackMatrix(bytes.subarray(start, means)),
		withinLots: unpackMatrix(bytes.subarray(means))
	};
}
