import { fileDamaged, fileOfOtherRenderer } from '$lib/core/messages/publish';
import { findReleaseFile } from '../db/findReleaseFile';
import type { FoundRelease } from '../db/findRelease';
import { rendererVersion } from '../pdf/rendererVersion';
import type { Stores } from '../work/stores';
import { makeReleaseFile, type ReleaseFileName } from './releaseFiles';
import { sha256 } from './sha256';

export type ReadFileOutcome =
	| {
			readonly status: 'found';
			readonly bytes: Uint8Array;
			readonly mediaType: string;
			readonly sha256: string;
			/** Whether the stored file was damaged and has been restored just now. */
			readonly wasHealed: boolean;
	  }
	| { readonly status: 'absent' }
	| { readonly status: 'damaged'; readonly message: string };

/**
 * The published bytes of a release's file, checked against their hash on every read. A damaged or
 * lost file is rendered again by the renderer that made it; the result counts only when it has the
 * published hash. Another renderer is refused and said: what it makes may look the same and isn't
 * what was published.
 */
export async function readReleaseFile(
	{ db, storage }: Stores,
	release: FoundRelease,
	name: ReleaseFileName
): Promise<ReadFileOutcome> {
	const file = await findReleaseFile(db, release.id, name);
	if (file === undefined) return { status: 'absent' };
	const found = { status: 'found', mediaType: file.mediaType, sha256: file.sha256 } as const;

	const stored = await readStored(storage, file.storageKey);
	if (stored && sha256(stored) === file.sha256)
		return { ...found, bytes: stored, wasHealed: false };

	if (name === 'datasheet.pdf' && release.rendererVersion !== rendererVersion)
		return {
			status: 'damaged',
			message: fileOfOtherRenderer(name, release.rendererVersion, rendererVersion)
		};
	if (sha256(release.document) !== release.contentHash)
		return { status: 'damaged', message: fileDamaged(name) };
	const bytes = await makeReleaseFile(name, release.document, release.record);
	if (sha256(bytes) !== file.sha256) return { status: 'damaged', message: fileDamaged(name) };
	await storage.put(bytes);
	return { ...found, bytes, wasHealed: true };
}

/** The stored bytes, or `undefined` where the file is gone. */
async function readStored(
	storage: Stores['storage'],
	key: string
): Promise<Uint8Array | undefined> {
	try {
		return await storage.read(key);
	} catch {
		return undefined;
	}
}
