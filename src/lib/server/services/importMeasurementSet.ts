import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { RefusalError } from '$lib/core/errors';
import type { UploadProblems } from '$lib/core/measurements/problems';
import { measurementMessages } from '$lib/core/messages/measurements';
import { findUpload } from '../db/findUpload';
import type { FoundUpload } from '../db/findUpload';
import { lot } from '../db/schema';
import type { JobContext, JobHandler } from '../work/jobHandler';
import type { Stores } from '../work/stores';
import { acceptSet } from './acceptSet';
import { clearStagedSets } from './clearStagedSets';
import { gatherSet, openReader, type FileReader } from './gatherSet';
import { refuseUpload } from './refuseUpload';
import { reportBytes } from './reportBytes';
import { openStagedSet, stageSuspects } from './stageSet';

export const importMeasurementSetPayload = z.object({
	upload: z.number().int(),
	by: z.string()
});

/**
 * file → sweeps or readings → checks → suspects → staged blocks → accepted set
 *
 * Nothing of the set is visible until the last step, which is one transaction. What an earlier
 * attempt left behind is removed first.
 */
export const importMeasurementSet: JobHandler = async (stores, payload, job) => {
	const { upload: id, by } = importMeasurementSetPayload.parse(payload);
	const { db } = stores;
	const found = await findUpload(db, id);
	if (found?.state === 'accepted') return { upload: id, set: found.set };
	if (found?.state !== 'mapped') return { upload: id, set: null };
	await clearStagedSets(db, id);

	const reader = await readFileOf(stores, found, job);
	const problems = await standsInTheWay(stores, found, reader);
	if (problems !== undefined) {
		await refuseUpload(db, id, problems);
		throw new RefusalError(problems.message ?? measurementMessages.linesRefused(problems.total));
	}

	const gathered = await gatherSet(reader, confirmedOf(found).mapping, job);
	const { counts } = gathered;
	const set = await openStagedSet(db, { upload: found, by });
	await gathered.stage(db, set);
	await stageSuspects(db, set, gathered.suspects);
	if (!(await job.isCurrent())) return { upload: id, set: null };
	await acceptSet(db, { upload: found, set, counts, by });
	return { upload: id, set, counts: { devices: counts.devices, points: counts.points } };
};

async function readFileOf(
	{ db, storage }: Stores,
	upload: FoundUpload,
	job: JobContext
): Promise<FileReader> {
	const { mapping, setup } = confirmedOf(upload);
	const reader = openReader(mapping, setup);
	for (const { name, waferLot } of await db
		.select()
		.from(lot)
		.where(eq(lot.product, upload.product))) {
		if (!reader.waferLotOf.has(name)) reader.waferLotOf.set(name, waferLot);
	}
	const report = reportBytes(job, upload.byteSize, measurementMessages.reading());
	const stream: AsyncIterable<Uint8Array> = storage.stream(upload.storageKey);
	for await (const bytes of stream) {
		reader.push(bytes);
		report(bytes.length);
		if (reader.refusal !== undefined) return reader;
	}
	reader.end();
	return reader;
}

/** Why the file can't be taken with this mapping; `undefined` when it can. */
async function standsInTheWay(
	{ db }: Stores,
	upload: FoundUpload,
	{ deviceCount, problems, refusal, waferLotOf }: FileReader
): Promise<UploadProblems | undefined> {
	const { mapping } = confirmedOf(upload);
	const { total } = problems;
	const because = (message: string | null): UploadProblems => ({
		message,
		total,
		lines: [...problems.lines]
	});
	if (refusal !== undefined) return because(refusal);
	if (total > 0 && mapping.skipLines === 0) return because(null);
	if (total !== mapping.skipLines) {
		return because(measurementMessages.skipCountDiffers(mapping.skipLines, total));
	}
	if (deviceCount === 0) return because(measurementMessages.noDataLines());

	const stored = await db.select().from(lot).where(eq(lot.product, upload.product));
	for (const { name, waferLot } of stored) {
		const stated = waferLotOf.get(name);
		if (stated !== undefined && stated !== waferLot) {
			return because(measurementMessages.waferLotDiffers(name, waferLot, stated));
		}
	}
	return undefined;
}

function confirmedOf({ id, confirmed }: FoundUpload) {
	if (confirmed === null) throw new Error(`upload ${id} is mapped without a mapping`);
	return confirmed;
}
