/** So much of a body that nobody wants is still read, so that its sender gets to hear the answer. */
const READ_ON_BYTES = 64_000_000;

/**
 * The pieces of a request's body. Whoever stops in the middle makes the framework tear the
 * connection down, and the sender would see a broken pipe instead of the refusal: so what still
 * comes is read and dropped, up to a limit.
 */
export async function* bodyPieces(body: ReadableStream<Uint8Array>): AsyncGenerator<Uint8Array> {
	const reader = body.getReader();
	let hasEnded = false;
	try {
		for (;;) {
			const next = await reader.read().catch((problem: unknown) => {
				hasEnded = true;
				throw problem;
			});
			hasEnded = next.done;
			if (next.done) return;
			yield next.value;
		}
	} finally {
		if (!hasEnded) await readOn(reader);
	}
}

async function readOn(reader: ReadableStreamDefaultReader<Uint8Array>): Promise<void> {
	let dropped = 0;
	while (dropped < READ_ON_BYTES) {
		const next = await reader.read().catch(() => undefined);
		if (next === undefined || next.done) return;
		dropped += next.value.byteLength;
	}
	await reader.cancel();
}
