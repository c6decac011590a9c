/** Stored bytes are not a matrix. */
export class PackedMatrixError extends Error {
	override readonly name = 'PackedMatrixError';
	constructor(readonly byteLength: number) {
		super(`a packed matrix requires a multiple of 8 bytes, got ${byteLength}`);
	}
}

/** A stored censor flag says none of at most, exactly and at least. */
export class PackedFlagError extends Error {
	override readonly name = 'PackedFlagError';
	constructor(readonly flag: number) {
		super(`a censor flag requires −1, 0 or 1, got ${flag}`);
	}
}
