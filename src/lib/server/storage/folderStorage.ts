import { createHash, randomUUID } from 'node:crypto';
import { constants, createReadStream } from 'node:fs';
import { access, mkdir, open, readFile, rename, rm } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { FileTooLargeError } from './storage';
import type { Storage, StoredFile } from './storage';

const keyOf = (sha256: string) => `${sha256.slice(0, 2)}/${sha256}`;

async function syncFolder(path: string): Promise<void> {
	const folder = await open(path, 'r');
	try {
		await folder.sync();
	} finally {
		await folder.close();
	}
}

/** Files in a folder: written aside, flushed to the disk, then renamed to their hash. */
export function folderStorage(root: string): Storage {
	const pathOf = (key: string) => join(root, key);

	async function putStream(
		source: AsyncIterable<Uint8Array>,
		limit = Number.POSITIVE_INFINITY
	): Promise<StoredFile> {
		const aside = join(root, 'incoming', randomUUID());
		await mkdir(dirname(aside), { recursive: true });
		try {
			const written = await writeAside(aside, source, limit);
			const key = keyOf(written.sha256);
			await mkdir(dirname(pathOf(key)), { recursive: true });
			await rename(aside, pathOf(key));
			await syncFolder(dirname(pathOf(key)));
			return { key, ...written };
		} catch (problem) {
			await rm(aside, { force: true });
			throw problem;
		}
	}

	return {
		putStream,
		put: (bytes) => putStream(once(bytes)),
		read: (key) => readFile(pathOf(key)),
		stream: (key) => createReadStream(pathOf(key)),
		isWritable: () =>
			access(root, constants.W_OK).then(
				() => true,
				() => false
			)
	};
}

async function* once(bytes: Uint8Array): AsyncIterable<Uint8Array> {
	yield await Promise.resolve(bytes);
}

async function writeAside(
	path: string,
	source: AsyncIterable<Uint8Array>,
	limit: number
): Promise<{ sha256: string; byteSize: number }> {
	const hash = createHash('sha256');
	let byteSize = 0;
	const file = await open(path, 'wx');
	try {
		for await (const part of source) {
			byteSize += part.byteLength;
			if (byteSize > limit) throw new FileTooLargeError(limit);
			hash.update(part);
			await file.writeFile(part);
		}
		await file.sync();
	} finally {
		await file.close();
	}
	return { sha256: hash.digest('hex'), byteSize };
}
