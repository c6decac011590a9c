const PIECE = 64 * 1024;

/** Lines as the bytes of a file, in pieces; each line ends with a line feed. */
export function* encodeLines(lines: Iterable<string>): Generator<Uint8Array> {
	const encoder = new TextEncoder();
	let piece = '';
	for (const line of lines) {
		piece += `${line}\n`;
		if (piece.length >= PIECE) {
			yield encoder.encode(piece);
			piece = '';
		}
	}
	if (piece !== '') yield encoder.encode(piece);
}
