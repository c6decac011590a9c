import { z } from 'zod';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { publicationRecord } from '$lib/core/datasheet/record';
import { renderDatasheet } from '../pdf/renderDatasheet';
import type { JobHandler } from '../work/jobHandler';

const payloadSchema = z.object({
	/** Storage key of the document's canonical bytes. */
	document: z.string(),
	record: publicationRecord
});

/** What the job leaves: where the PDF lies, by its content. */
export const drawnProof = z.object({ key: z.string(), sha256: z.string() });

/** Draws the proof of a draft. Running it again gives the same bytes under the same key. */
export const renderProof: JobHandler = async ({ storage }, payload, job) => {
	const { document, record } = payloadSchema.parse(payload);
	job.report({ done: 0, total: 1, words: 'Drawing the proof' });
	const pdf = await renderDatasheet(readDocument(await storage.read(document)), record);
	const { key, sha256 } = await storage.put(pdf);
	return drawnProof.parse({ key, sha256 });
};
