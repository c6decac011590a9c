import { describe, expect, it } from 'vitest';
import { bodyPieces } from './bodyPieces';

/** A body of so many pieces of a megabyte, and what became of it. */
function body(pieces: number, failsAt?: number) {
	const seen = { given: 0, isCancelled: false };
	const stream = new ReadableStream<Uint8Array>(
		{
			pull(controller) {
				if (seen.given === failsAt) controller.error(new Error('the sender is gone'));
				else if (seen.given === pieces) controller.close();
				else {
					seen.given += 1;
					controller.enqueue(new Uint8Array(1_000_000));
				}
			},
			cancel() {
				seen.isCancelled = true;
			}
		},
		{ highWaterMark: 0 }
	);
	return { stream, seen };
}

async function take(stream: ReadableStream<Uint8Array>, most: number): Promise<number> {
	let taken = 0;
	for await (const piece of bodyPieces(stream)) {
		taken += piece.byteLength / 1_000_000;
		if (taken >= most) break;
	}
	return taken;
}

describe('bodyPieces', () => {
	it('gives all of a body', async () => {
		const { stream, seen } = body(5);
		expect(await take(stream, Infinity)).toBe(5);
		expect(seen).toEqual({ given: 5, isCancelled: false });
	});

	it('reads a body to its end when its taker has had enough', async () => {
		const { stream, seen } = body(20);
		expect(await take(stream, 2)).toBe(2);
		expect(seen).toEqual({ given: 20, isCancelled: false });
	});

	it('gives up on a body that never ends', async () => {
		const { stream, seen } = body(1000);
		await take(stream, 2);
		expect(seen).toEqual({ given: 66, isCancelled: true });
	});

	it('passes on that the sender is gone', async () => {
		const { stream } = body(20, 3);
		await expect(take(stream, Infinity)).rejects.toThrow('the sender is gone');
	});
});
