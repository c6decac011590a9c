/** Stored bytes are not a matrix. */
export class PackedMatrixError extends Error {
	override readonly name = 'PackedMatrixError';
	constructor(readonly byteLength: number) {
		super(`a packed matrix requires a multiple of 8 bytes, got ${byteLength}`);
	}
}
