import { afterEach, beforeEach, expect, it } from 'vitest';
import { worklistMessages as say } from '$lib/core/messages/worklist';
import type { LimitRow } from '$lib/core/limits/limit';
import { listAssessments } from '$lib/server/db/listAssessments';
import { job } from '$lib/server/db/schema';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { gatherWorklist } from '$lib/server/services/gatherWorklist';
import { publishRelease } from '$lib/server/services/publishRelease';
import { handlers } from '$lib/server/work/handlers';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import { insertAcceptedSet } from '../factories/acceptedSet';
import {
	approve,
	BIASES,
	documentOf,
	openReviewBench,
	submit,
	type ReviewBench
} from '../factories/reviewBench';
import { PEOPLE } from '../factories/reviewPeople';

const NOW = new Date().toISOString();

let bench: ReviewBench;
let rows: LimitRow[];
beforeEach(async () => {
	bench = await openReviewBench();
	rows = await bench.limitRows();
	const revision = await submit(bench, documentOf(rows));
	await approve(bench, revision);
	await publishRelease(bench.stores, {
		revision,
		effectiveFrom: NOW.slice(0, 10),
		by: 'noor'
	});
	await runOpenJobs(bench.stores, handlers);
});
afterEach(() => bench.close());

/** Another lot, its capacitances off by a factor, measured, summed up and judged. */
async function measureAnotherLot(factor: number): Promise<void> {
	const { stores, product } = bench;
	const devices = Array.from({ length: 60 }, (_, i) => ({
		lot: 'LK26-025',
		wafer: `0${1 + Math.floor(i / 30)}`,
		name: String(i + 1)
	}));
	const spread = (i: number) => Math.exp(0.012 * Math.sin(i * 2.3));
	await insertAcceptedSet(stores.db, {
		product: product.id,
		sha256: '7'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: 1e6,
		picofarads: new Map([
			[
				25,
				Float64Array.from(
					devices.flatMap((_, i) =>
						BIASES.map((bias) => factor * 40 * (1 + bias / 2) ** -1.1 * spread(i))
					)
				)
			]
		])
	});
	await computeDistributions(
		stores,
		{ product: product.id },
		{ id: 9, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);
	await runOpenJobs(stores, handlers);
}

const worklist = () => gatherWorklist(bench.stores.db, { id: 'ida', roles: PEOPLE.ida }, NOW);

it('says that limits are contradicted where a new lot lies outside of them', async () => {
	await measureAnotherLot(1.12);
	const [found] = await listAssessments(bench.stores.db);
	expect(found?.rows.map(({ state }) => state)).toEqual(BIASES.map(() => 'contradicted'));
	expect(found?.rows[1]?.text).toMatch(/^\d+ of 360 devices lie beyond the maximum of /);
	const group = (await worklist()).find(({ title }) => title === 'Published limits contradicted');
	expect(group?.items[0]?.text).toBe(say.contradicted('1.0', BIASES.length));
	expect(group?.amount).toBe('3 limits');
});

it('says that limits are no longer supported where they would be looser today', async () => {
	await measureAnotherLot(1.035);
	const [found] = await listAssessments(bench.stores.db);
	expect(new Set(found?.rows.map(({ state }) => state))).toEqual(new Set(['unsupported']));
	expect((await worklist()).map(({ title }) => title)).toContain(
		'Published limits no longer supported'
	);
});

it('has nothing to raise where they hold or could be tighter', async () => {
	await measureAnotherLot(1);
	const [found] = await listAssessments(bench.stores.db);
	expect(found?.rows.every(({ state }) => state === 'moved')).toBe(true);
	expect((await worklist()).map(({ title }) => title)).not.toContain(
		'Published limits contradicted'
	);
});

it('is no job where nothing is published', async () => {
	const other = await openReviewBench();
	const queued = await other.stores.db.select({ kind: job.kind }).from(job);
	expect(queued.map(({ kind }) => kind)).not.toContain('assess-releases');
	other.close();
});
