import type { Readable } from 'node:stream';

export interface StoredFile {
	/** Where it lies, by its content. */
	readonly key: string;
	/** Hex. */
	readonly sha256: string;
	readonly byteSize: number;
}

/** Files by content: what is stored once is never written again, and never changes. */
export interface Storage {
	put(bytes: Uint8Array): Promise<StoredFile>;
	/**
	 * Stores a stream without holding it in memory.
	 *
	 * @throws {FileTooLargeError} when more than `limit` bytes come
	 */
	putStream(source: AsyncIterable<Uint8Array>, limit?: number): Promise<StoredFile>;
	read(key: string): Promise<Buffer>;
	stream(key: string): Readable;
	isWritable(): Promise<boolean>;
}

export class FileTooLargeError extends Error {
	override readonly name = 'FileTooLargeError';
	constructor(readonly limit: number) {
		super(`a file may have at most ${limit} bytes`);
	}
}
