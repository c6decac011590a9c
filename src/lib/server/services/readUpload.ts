import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { RefusalError } from '$lib/core/errors';
import { FileSurvey } from '$lib/core/measurements/fileSurvey';
import type { SurveyOutcome } from '$lib/core/measurements/fileSurvey';
import { previewUpload } from '$lib/core/measurements/preview';
import type { UploadPreview } from '$lib/core/measurements/preview';
import { measurementMessages } from '$lib/core/messages/measurements';
import { findUpload } from '../db/findUpload';
import { upload } from '../db/schema';
import { write } from '../db/write';
import type { JobHandler } from '../work/jobHandler';
import { reportBytes } from './reportBytes';
import { refuseUpload } from './refuseUpload';

export const readUploadPayload = z.object({ upload: z.number().int() });

/**
 * Looks at an uploaded file for the first time: how its lines are written, what its columns seem to
 * mean, how many lines it has. What can't be read as a table is refused with the reason.
 */
export const readUpload: JobHandler = async ({ db, storage }, payload, job) => {
	const { upload: id } = readUploadPayload.parse(payload);
	const found = await findUpload(db, id);
	if (found?.state !== 'received') return { upload: id };

	const survey = new FileSurvey();
	const report = reportBytes(job, found.byteSize, measurementMessages.reading());
	const stream: AsyncIterable<Uint8Array> = storage.stream(found.storageKey);
	for await (const bytes of stream) {
		survey.push(bytes);
		report(bytes.length);
	}
	const outcome = preview(survey.outcome());
	if (typeof outcome === 'string') {
		await refuseUpload(db, id, { message: outcome, total: 0, lines: [] });
		throw new RefusalError(outcome);
	}
	await write(db, (tx) =>
		tx.update(upload).set({ state: 'read', preview: outcome }).where(eq(upload.id, id))
	);
	return { upload: id, lineCount: outcome.lineCount };
};

/** The preview, or why there is none. */
function preview(survey: SurveyOutcome): UploadPreview | string {
	switch (survey.status) {
		case 'empty':
			return measurementMessages.emptyFile();
		case 'utf16':
			return measurementMessages.utf16();
		case 'binary':
			return measurementMessages.notText();
		case 'text': {
			const outcome = previewUpload(survey.head, survey);
			if (outcome.status === 'read') return outcome.preview;
			return outcome.status === 'noTable'
				? measurementMessages.notATable()
				: measurementMessages.noDataLines();
		}
		default:
			return survey satisfies never;
	}
}
