import { measurementMessages } from '$lib/core/messages/measurements';
import { productNotFound } from '$lib/core/messages/review';
import { appendAudit } from '../db/appendAudit';
import type { Database } from '../db/database';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { findUploadByHash } from '../db/findUploadByHash';
import { upload } from '../db/schema';
import { write } from '../db/write';
import { FileTooLargeError } from '../storage/storage';
import type { StoredFile } from '../storage/storage';
import { enqueue } from '../work/enqueue';
import type { Stores } from '../work/stores';

/** The largest file that is taken unless a caller says otherwise. */
export const UPLOAD_LIMIT_BYTES = 512_000_000;

export type ReceiveOutcome =
	| { readonly status: 'received'; readonly upload: number; readonly job: number }
	| {
			readonly status: 'refused';
			readonly why: 'noProduct' | 'noName' | 'empty' | 'tooLarge';
			readonly message: string;
	  }
	| {
			readonly status: 'refused';
			readonly why: 'duplicate';
			readonly message: string;
			/** The upload that brought this file before. */
			readonly earlier: { readonly upload: number; readonly partNumber: string };
	  };

/**
 * Stores a file as it comes, without ever holding it in memory, and queues the first look at it.
 * The same bytes are taken once, whatever their name and product: readings must not count twice.
 */
export async function receiveUpload(
	{ db, storage }: Stores,
	input: {
		readonly partNumber: string;
		readonly fileName: string;
		readonly body: AsyncIterable<Uint8Array>;
		readonly by: string;
		/** Bytes; 512 MB by default. */
		readonly limit?: number;
	}
): Promise<ReceiveOutcome> {
	const { limit = UPLOAD_LIMIT_BYTES, by } = input;
	const fileName = plainFileName(input.fileName);
	if (fileName === '') return refused('noName', measurementMessages.fileNameMissing());
	const product = await findProductByPartNumber(db, input.partNumber);
	if (product === undefined) return refused('noProduct', productNotFound(input.partNumber));

	let file: StoredFile;
	try {
		file = await storage.putStream(input.body, limit);
	} catch (problem) {
		if (!(problem instanceof FileTooLargeError)) throw problem;
		return refused('tooLarge', measurementMessages.fileTooLarge(limit));
	}
	if (file.byteSize === 0) return refused('empty', measurementMessages.emptyFile());

	return write(db, async (tx) => {
		const earlier = await duplicateOf(tx, file);
		if (earlier !== undefined) return earlier;
		const [created] = await tx
			.insert(upload)
			.values({
				product: product.id,
				fileName,
				sha256: file.sha256,
				byteSize: file.byteSize,
				storageKey: file.key,
				state: 'received',
				uploadedBy: by,
				uploadedAt: new Date().toISOString()
			})
			.returning({ id: upload.id });
		if (created === undefined) throw new Error('the upload was not stored');
		const job = await enqueue(tx, {
			kind: 'read-upload',
			payload: { upload: created.id },
			dedupeKey: `read-upload:${created.id}`,
			by
		});
		await appendAudit(tx, {
			action: 'upload.receive',
			subject: `${product.partNumber} ${fileName}`,
			by,
			details: { upload: created.id, sha256: file.sha256, byteSize: file.byteSize }
		});
		return { status: 'received', upload: created.id, job };
	});
}

async function duplicateOf(
	tx: Database,
	{ sha256 }: StoredFile
): Promise<ReceiveOutcome | undefined> {
	const earlier = await findUploadByHash(tx, sha256);
	return (
		earlier && {
			status: 'refused',
			why: 'duplicate',
			message: measurementMessages.duplicate(
				earlier.fileName,
				earlier.partNumber,
				earlier.uploadedAt
			),
			earlier: { upload: earlier.id, partNumber: earlier.partNumber }
		}
	);
}

function refused(
	why: 'noProduct' | 'noName' | 'empty' | 'tooLarge',
	message: string
): ReceiveOutcome {
	return { status: 'refused', why, message };
}

/** Without folders and control characters, and of a length that fits a table. */
function plainFileName(name: string): string {
	return (name.split(/[/\\]/).at(-1) ?? '')
		.replace(/\p{Cc}/gu, '')
		.trim()
		.slice(0, 200);
}
