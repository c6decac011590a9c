import { readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { readDocument } from '$lib/core/datasheet/readDocument';
import type { LimitRow } from '$lib/core/limits/limit';
import {
	dateInThePast,
	fileDamaged,
	fileOfOtherRenderer,
	releaseIsNot,
	versionMoved
} from '$lib/core/messages/publish';
import {
	nothingChangedSinceRelease,
	reasonNeeded,
	revisionIsNot,
	rolesDoNotAllow
} from '$lib/core/messages/review';
import { concernLoosened } from '$lib/core/messages/verification';
import { findRelease, type FoundRelease } from '$lib/server/db/findRelease';
import { findReleaseFile } from '$lib/server/db/findReleaseFile';
import { findRevisionById } from '$lib/server/db/findRevision';
import { listDecisions } from '$lib/server/db/listDecisions';
import { listPublished } from '$lib/server/db/listPublished';
import { listReleases } from '$lib/server/db/listReleases';
import { listVerificationRows } from '$lib/server/db/listVerificationRows';
import { audit, job, release, releaseFile } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { rendererVersion } from '$lib/server/pdf/rendererVersion';
import { decideRevision } from '$lib/server/services/decideRevision';
import { freezeRevision } from '$lib/server/services/freezeRevision';
import { publishRelease } from '$lib/server/services/publishRelease';
import { publishReleaseJob } from '$lib/server/services/publishReleaseJob';
import { readReleaseFile } from '$lib/server/services/readReleaseFile';
import { settleDueReleases } from '$lib/server/services/settleDueReleases';
import { sha256 } from '$lib/server/services/sha256';
import { reinstateRelease, withdrawRelease } from '$lib/server/services/withdrawRelease';
import type { JobContext } from '$lib/server/work/jobHandler';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import type { Stores } from '$lib/server/work/stores';
import {
	approve,
	documentOf,
	openReviewBench,
	PART,
	submit,
	type ReviewBench
} from '../factories/reviewBench';

const today = new Date().toISOString().slice(0, 10);
const TOMORROW = new Date(Date.now() + 86_400_000).toISOString().slice(0, 10);
const YESTERDAY = new Date(Date.now() - 86_400_000).toISOString().slice(0, 10);
const handlers = { 'publish-release': publishReleaseJob };
const CURRENT: JobContext = {
	id: 1,
	attempt: 1,
	report: () => undefined,
	isCurrent: () => Promise.resolve(true)
};

let bench: ReviewBench;
let rows: LimitRow[];
beforeEach(async () => {
	bench = await openReviewBench();
	rows = await bench.limitRows();
});
afterEach(() => bench.close());

async function approved(document = documentOf(rows)): Promise<number> {
	const id = await submit(bench, document);
	await approve(bench, id);
	return id;
}

async function published(
	document = documentOf(rows),
	effectiveFrom: string = today
): Promise<FoundRelease> {
	const revision = await approved(document);
	const outcome = await publishRelease(bench.stores, { revision, effectiveFrom, by: 'noor' });
	if (outcome.status === 'refused') throw new Error(outcome.message);
	await runOpenJobs(bench.stores, handlers);
	const found = await findRelease(bench.stores.db, PART, outcome.version);
	if (found === undefined) throw new Error('nothing was published');
	return found;
}

/** The same limits with the minimum at 4 V one step lower. */
function loosened(): LimitRow[] {
	return rows.map((row) => {
		if (row.condition.reverseVoltage !== 4 || row.minimum === null) return row;
		const text = (Number(row.minimum.text) - 0.1).toFixed(1);
		return { ...row, minimum: { ...row.minimum, text, printed: Number(text) * 1e-12 } };
	});
}

async function queuedPayload(): Promise<unknown> {
	const [queued] = await bench.stores.db.select().from(job);
	return queued?.payload;
}

async function storedPath(found: FoundRelease, name: string): Promise<string> {
	const file = await findReleaseFile(bench.stores.db, found.id, name);
	return join(bench.folder, file?.storageKey ?? '');
}

describe('publishing', () => {
	it('makes a current release with its files, and writes everything at once', async () => {
		const found = await published();
		expect(found).toMatchObject({ major: 1, minor: 0, state: 'current', effectiveFrom: today });
		const revision = await findRevisionById(bench.stores.db, found.revision);
		expect(revision?.state).toBe('published');
		expect(
			(await listDecisions(bench.stores.db, found.revision)).map(({ event, by }) => [event, by])
		).toEqual([
			['submit', 'ida'],
			['approve', 'tomas'],
			['publish', 'noor']
		]);
		const pdf = await readReleaseFile(bench.stores, found, 'datasheet.pdf');
		if (pdf.status !== 'found') throw new Error(pdf.status);
		expect(Buffer.from(pdf.bytes.subarray(0, 5)).toString()).toBe('%PDF-');
		const json = await readReleaseFile(bench.stores, found, 'datasheet.json');
		expect(json).toMatchObject({ status: 'found', sha256: found.contentHash });
		const csv = await readReleaseFile(bench.stores, found, 'capacitance-table.csv');
		if (csv.status !== 'found') throw new Error(csv.status);
		const at4V = rows.find(({ condition }) => condition.reverseVoltage === 4);
		expect(Buffer.from(csv.bytes).toString()).toContain(
			`25,1000000,4,${at4V?.minimum?.text},${at4V?.typical?.text},${at4V?.maximum?.text},pF,characterized\r\n`
		);
		const trail = await bench.stores.db
			.select({ action: audit.action, subject: audit.subject })
			.from(audit)
			.where(eq(audit.subject, `${PART} 1.0`));
		expect(trail.map(({ action }) => action)).toEqual([
			'release.request',
			'release.publish',
			'release.becomeEffective'
		]);
	});

	it('is refused before approval, before today, and for a version that has moved', async () => {
		const revision = await submit(bench, documentOf(rows));
		const ask = (more: { effectiveFrom?: string; version?: string; by?: string }) =>
			publishRelease(bench.stores, { revision, effectiveFrom: today, by: 'noor', ...more });
		expect(await ask({})).toEqual({
			status: 'refused',
			message: revisionIsNot(1, 'published', 'in review')
		});
		await approve(bench, revision);
		expect(await ask({ effectiveFrom: YESTERDAY })).toEqual({
			status: 'refused',
			message: dateInThePast(today)
		});
		expect(await ask({ version: '2.0' })).toEqual({
			status: 'refused',
			message: versionMoved('2.0', '1.0')
		});
		for (const by of ['ida', 'tomas', 'per'])
			expect(await ask({ by })).toEqual({
				status: 'refused',
				message: rolesDoNotAllow('publish a release')
			});
		expect(await bench.stores.db.select().from(job)).toEqual([]);
	});

	it('stays scheduled until its day and leaves the current one in force', async () => {
		await published();
		const second = await published(documentOf(loosened()), TOMORROW);
		expect(second).toMatchObject({ major: 2, minor: 0, state: 'scheduled' });
		const states = async (day: string) =>
			(await listPublished(bench.stores.db, day)).map(({ major, state }) => [major, state]);
		expect(await states(today)).toEqual([
			[2, 'scheduled'],
			[1, 'current']
		]);
		expect(await states(TOMORROW)).toEqual([
			[2, 'current'],
			[1, 'superseded']
		]);
		expect(await settleDueReleases(bench.stores)).toBe(0);
		await write(bench.stores.db, (tx) =>
			tx.update(release).set({ effectiveFrom: today }).where(eq(release.id, second.id))
		);
		expect(await settleDueReleases(bench.stores)).toBe(1);
		expect((await findRelease(bench.stores.db, PART, '1.0'))?.state).toBe('superseded');
		expect((await findRelease(bench.stores.db, PART, '2.0'))?.state).toBe('current');
	});

	it('asks for one job however often it is asked', async () => {
		const revision = await approved();
		const ask = () => publishRelease(bench.stores, { revision, effectiveFrom: today, by: 'noor' });
		const [first, second] = [await ask(), await ask()];
		expect(first).toEqual(second);
		expect(await bench.stores.db.select().from(job)).toHaveLength(1);
	});
});

describe('a job that is interrupted', () => {
	const ask = async () => {
		const revision = await approved();
		await publishRelease(bench.stores, { revision, effectiveFrom: today, by: 'noor' });
		return revision;
	};

	it('makes one release when it runs twice', async () => {
		await ask();
		const payload = await queuedPayload();
		const first = await publishReleaseJob(bench.stores, payload, CURRENT);
		const second = await publishReleaseJob(bench.stores, payload, CURRENT);
		expect(second).toEqual(first);
		expect(await bench.stores.db.select().from(release)).toHaveLength(1);
		expect(await bench.stores.db.select().from(releaseFile)).toHaveLength(3);
	});

	it('makes one release when two run at once', async () => {
		await ask();
		const payload = await queuedPayload();
		await Promise.all([
			publishReleaseJob(bench.stores, payload, CURRENT),
			publishReleaseJob(bench.stores, payload, CURRENT)
		]);
		expect(await bench.stores.db.select().from(release)).toHaveLength(1);
	});

	it('leaves nothing half done when it dies between the files and the transaction', async () => {
		const revision = await ask();
		const payload = await queuedPayload();
		const died = new Error('the power went');
		const dying: JobContext = { ...CURRENT, isCurrent: () => Promise.reject(died) };
		await expect(publishReleaseJob(bench.stores, payload, dying)).rejects.toBe(died);
		expect(await bench.stores.db.select().from(release)).toEqual([]);
		expect(await bench.stores.db.select().from(releaseFile)).toEqual([]);
		expect((await findRevisionById(bench.stores.db, revision))?.state).toBe('approved');
		await publishReleaseJob(bench.stores, payload, CURRENT);
		expect((await findRelease(bench.stores.db, PART, '1.0'))?.state).toBe('current');
	});

	it('leaves nothing half done when the file can’t be stored', async () => {
		await ask();
		const full = new Error('no space left');
		let stored = 0;
		const stores: Stores = {
			...bench.stores,
			storage: {
				...bench.stores.storage,
				put: (bytes) => (++stored < 2 ? bench.stores.storage.put(bytes) : Promise.reject(full))
			}
		};
		await expect(publishReleaseJob(stores, await queuedPayload(), CURRENT)).rejects.toBe(full);
		expect(await bench.stores.db.select().from(release)).toEqual([]);
	});

	it('writes nothing when a newer attempt has taken over', async () => {
		await ask();
		await publishReleaseJob(bench.stores, await queuedPayload(), {
			...CURRENT,
			isCurrent: () => Promise.resolve(false)
		});
		expect(await bench.stores.db.select().from(release)).toEqual([]);
	});

	it('publishes nothing of a revision that was returned meanwhile', async () => {
		const revision = await ask();
		await decideRevision(bench.stores, {
			revision,
			decision: 'return',
			reason: 'Stop.',
			by: 'tomas'
		});
		await expect(publishReleaseJob(bench.stores, await queuedPayload(), CURRENT)).rejects.toThrow(
			'Revision 1 is returned, so it was not published.'
		);
		expect(await bench.stores.db.select().from(release)).toEqual([]);
	});
});

describe('the next version', () => {
	it('is refused when nothing differs', async () => {
		await published();
		expect(
			await freezeRevision(bench.stores, {
				product: bench.product,
				resolved: { document: documentOf(rows), slots: [], problems: [] },
				by: 'ida'
			})
		).toEqual({ status: 'refused', problems: [nothingChangedSinceRelease('1.0')] });
	});

	it('is minor for a text, and says what changed', async () => {
		await published();
		const second = await published(documentOf(rows, { description: 'Another description' }));
		expect(second).toMatchObject({ major: 1, minor: 1, state: 'current' });
		expect(second.record.history.map(({ changes }) => changes)).toEqual([
			'1 text changed.',
			'First release.'
		]);
		expect(second.record.previous).toEqual({ version: { major: 1, minor: 0 }, date: today });
		expect(second.record.changedRows).toEqual(['masthead.description']);
	});

	it('is major for a loosened limit, which its sheet shows as risky', async () => {
		await published();
		const second = await published(documentOf(loosened()));
		expect(second).toMatchObject({ major: 2, minor: 0 });
		const sheet = await listVerificationRows(bench.stores.db, second.revision);
		const row = sheet.find((entry) => entry.row === 'capacitance.25c.VR=4');
		expect(row?.evidence.previous?.changes).toEqual({
			minimum: 'loosened',
			typical: 'same',
			maximum: 'same'
		});
		expect(row?.evidence.concerns).toContain(concernLoosened('minimum'));
		// What the release before said the same needs no second look.
		expect(sheet.find((entry) => entry.row === 'ratings.power')?.evidence.risk).toBe('low');
	});
});

describe('withdrawing', () => {
	it('needs marketing and a reason, frees no version, and can be undone', async () => {
		const first = await published();
		const withdraw = (reason: string, by = 'noor') =>
			withdrawRelease(bench.stores, { release: first.id, reason, by });
		expect(await withdraw('')).toEqual({ status: 'refused', message: reasonNeeded() });
		expect(await withdraw('Wrong marking.', 'tomas')).toEqual({
			status: 'refused',
			message: rolesDoNotAllow('have a release withdrawn')
		});
		expect(await withdraw('Wrong marking.')).toEqual({ status: 'withdrawn' });
		expect(await withdraw('Again.')).toEqual({
			status: 'refused',
			message: releaseIsNot('1.0', 'withdrawn', 'withdrawn')
		});
		const second = await published(documentOf(rows, { description: 'Mended' }));
		expect(second).toMatchObject({ major: 1, minor: 1, state: 'current' });
		expect(second.record.previous?.version).toEqual({ major: 1, minor: 0 });
		expect(second.record.history[1]?.changes).toBe('First release. Withdrawn.');

		const reinstate = { release: first.id, reason: 'It was right.', by: 'noor' };
		expect(await reinstateRelease(bench.stores, reinstate)).toEqual({ status: 'reinstated' });
		expect(
			(await listReleases(bench.stores.db, bench.product.id)).map(({ minor, state }) => [
				minor,
				state
			])
		).toEqual([
			[1, 'current'],
			[0, 'superseded']
		]);
	});
});

describe('a published file', () => {
	const read = (found: FoundRelease) => readReleaseFile(bench.stores, found, 'datasheet.pdf');

	it('is healed to the same bytes when the stored one is damaged or lost', async () => {
		const found = await published();
		const path = await storedPath(found, 'datasheet.pdf');
		const before = await readFile(path);
		const damaged = Buffer.from(before);
		damaged[1000] = (damaged[1000] ?? 0) ^ 1;
		await writeFile(path, damaged);
		expect(await read(found)).toMatchObject({ status: 'found', wasHealed: true });
		expect((await readFile(path)).equals(before)).toBe(true);
		await rm(path);
		expect(await read(found)).toMatchObject({ status: 'found', wasHealed: true });
		expect(await read(found)).toMatchObject({ status: 'found', wasHealed: false });
		expect(sha256(await readFile(path))).toBe(sha256(before));
	});

	it('is refused when another renderer would have to restore it', async () => {
		const found = await published();
		await writeFile(await storedPath(found, 'datasheet.pdf'), 'damaged');
		expect(await read({ ...found, rendererVersion: 'platen-pdf-0' })).toEqual({
			status: 'damaged',
			message: fileOfOtherRenderer('datasheet.pdf', 'platen-pdf-0', rendererVersion)
		});
	});

	it('is refused when the document behind it is damaged as well', async () => {
		const found = await published();
		await writeFile(await storedPath(found, 'datasheet.pdf'), 'damaged');
		const document = Buffer.from(found.document.toString().replace('Hyperabrupt', 'Abrupt'));
		expect(await read({ ...found, document })).toEqual({
			status: 'damaged',
			message: fileDamaged('datasheet.pdf')
		});
	});

	it('is refused when the restored bytes are not the published ones', async () => {
		const found = await published();
		await writeFile(await storedPath(found, 'datasheet.pdf'), 'damaged');
		const record = { ...found.record, date: TOMORROW };
		expect(await read({ ...found, record })).toEqual({
			status: 'damaged',
			message: fileDamaged('datasheet.pdf')
		});
	});

	it('keeps the frozen document readable', async () => {
		const found = await published();
		expect(readDocument(found.document)).toEqual(documentOf(rows));
	});
});
