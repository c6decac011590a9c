import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { worklistMessages as say } from '$lib/core/messages/worklist';
import type { OpenDatabase } from '$lib/server/db/client';
import {
	comment,
	decision,
	job,
	measurementSet,
	revision,
	suspect,
	upload,
	verdict,
	verificationRow
} from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { countWaiting, gatherWorklist, oldestSince } from '$lib/server/services/gatherWorklist';
import { ENGINEER, insertProduct } from '../factories/acceptedSet';
import { insertReviewPeople, PEOPLE } from '../factories/reviewPeople';
import { openTestDatabase } from '../factories/testDatabase';

const NOW = '2026-12-01T08:00:00.000Z';
const AT = '2026-11-28T09:00:00.000Z';
const LATER = '2026-11-29T09:00:00.000Z';
const HZ = 'T=25;f=1000000';

let database: OpenDatabase;
let product: number;

const actor = (id: keyof typeof PEOPLE) => ({ id, roles: PEOPLE[id] });
const worklistOf = (id: keyof typeof PEOPLE) => gatherWorklist(database.db, actor(id), NOW);
const titlesOf = async (id: keyof typeof PEOPLE) =>
	(await worklistOf(id)).map(({ title }) => title);

beforeEach(async () => {
	database = await openTestDatabase();
	await insertReviewPeople(database.db);
	product = await insertProduct(database.db);
});
afterEach(() => database.close());

async function uploaded(state: 'read' | 'accepted', sha256: string): Promise<number> {
	const [stored] = await write(database.db, (tx) =>
		tx
			.insert(upload)
			.values({
				product,
				fileName: 'lots.csv',
				sha256,
				byteSize: 1,
				storageKey: sha256,
				state,
				uploadedBy: ENGINEER,
				uploadedAt: AT
			})
			.returning()
	);
	if (stored === undefined) throw new Error('nothing stored');
	return stored.id;
}

async function setWithSuspects(state: 'accepted' | 'retired', sha256 = 'b'.repeat(64)) {
	const file = await uploaded('accepted', sha256);
	return write(database.db, async (tx) => {
		const [set] = await tx
			.insert(measurementSet)
			.values({ product, upload: file, setup: {}, state, acceptedBy: ENGINEER, acceptedAt: AT })
			.returning();
		const id = set?.id ?? 0;
		for (const [device, conditionKey] of [
			[3, HZ],
			[3, 'T=85;f=1000000'],
			[7, HZ]
		] as const)
			await tx
				.insert(suspect)
				.values({ set: id, device, conditionKey, reason: { rule: 'rises', text: '' } });
		return id;
	});
}

async function revised(
	number: number,
	state: 'inReview' | 'approved' | 'returned',
	by: keyof typeof PEOPLE = ENGINEER,
	editors: string[] = [by]
): Promise<number> {
	const [stored] = await write(database.db, (tx) =>
		tx
			.insert(revision)
			.values({
				product,
				number,
				document: Buffer.from('{}'),
				sha256: '0',
				state,
				submittedBy: by,
				submittedAt: AT,
				editors
			})
			.returning()
	);
	return stored?.id ?? 0;
}

const decided = (id: number, event: 'approve' | 'return', by: keyof typeof PEOPLE) =>
	write(database.db, (tx) =>
		tx.insert(decision).values({ revision: id, event, reason: 'V_F at 1 A.', by, at: LATER })
	);

it('is empty when nothing waits', async () => {
	expect(await worklistOf('lena')).toEqual([]);
	expect(oldestSince([])).toBeUndefined();
});

describe('quarantined devices', () => {
	it('are counted once a device, for product engineers', async () => {
		const set = await setWithSuspects('accepted');
		const [group] = await worklistOf(ENGINEER);
		expect(group).toMatchObject({
			title: 'Quarantined devices',
			amount: say.devices(2),
			items: [
				{
					partNumber: 'LKT-1130',
					text: say.quarantined(2, set),
					href: `/products/LKT-1130/measurements/sets/${set}`
				}
			]
		});
		expect(await titlesOf('tomas')).toEqual([]);
	});

	it('leave with their last verdict, and with a set that is no longer in use', async () => {
		const set = await setWithSuspects('accepted');
		const verdictOn = (device: number, conditionKey: string) =>
			write(database.db, (tx) =>
				tx.insert(verdict).values({
					set,
					device,
					conditionKey,
					decision: 'keep',
					reason: 'genuine',
					by: ENGINEER,
					at: LATER
				})
			);
		await verdictOn(7, HZ);
		await verdictOn(3, HZ);
		expect((await worklistOf(ENGINEER))[0]?.amount).toBe(say.devices(1));
		await verdictOn(3, 'T=85;f=1000000');
		await setWithSuspects('retired', 'c'.repeat(64));
		expect(await titlesOf(ENGINEER)).toEqual([]);
	});
});

it('names files that wait for their mapping', async () => {
	const id = await uploaded('read', 'a'.repeat(64));
	expect(await worklistOf(ENGINEER)).toMatchObject([
		{
			title: 'Files to map',
			items: [{ href: `/products/LKT-1130/measurements/uploads/${id}`, since: AT }]
		}
	]);
});

describe('returned revisions', () => {
	it('wait for who submitted them, with the comments counted', async () => {
		const id = await revised(1, 'returned');
		await decided(id, 'return', 'tomas');
		await write(database.db, (tx) =>
			tx.insert(comment).values([
				{ revision: id, text: 'one', by: 'tomas', at: LATER },
				{ revision: id, text: 'two', by: 'tomas', at: LATER }
			])
		);
		expect(await worklistOf(ENGINEER)).toMatchObject([
			{
				title: 'Returned revisions',
				items: [{ text: say.returned(1, 'tomas', 2), note: 'V_F at 1 A.', since: LATER }]
			}
		]);
		expect(await titlesOf('lena')).toEqual([]);
	});

	it('leave when a later one is submitted', async () => {
		await decided(await revised(1, 'returned'), 'return', 'tomas');
		await revised(2, 'inReview');
		expect(await titlesOf(ENGINEER)).toEqual([]);
	});
});

describe('revisions to verify', () => {
	it('wait for applications engineers, with the rows counted', async () => {
		const id = await revised(1, 'inReview');
		await write(database.db, (tx) =>
			tx.insert(verificationRow).values(
				(['ticked', 'ticked', 'flagged', 'open'] as const).map((state, position) => ({
					revision: id,
					row: `row-${position}`,
					position,
					evidence: {},
					state
				}))
			)
		);
		expect(await worklistOf('tomas')).toMatchObject([
			{ title: 'Revisions to verify', items: [{ note: say.toVerifyNote(2, 1, 4) }] }
		]);
		expect(await titlesOf('noor')).toEqual([]);
		expect(await titlesOf('per')).toEqual([]);
	});

	it('never wait for who submitted or edited them', async () => {
		await revised(1, 'inReview', ENGINEER, [ENGINEER, 'lena']);
		expect(await titlesOf('lena')).toEqual([]);
		expect(await titlesOf('tomas')).toEqual(['Revisions to verify']);
	});
});

describe('approved revisions', () => {
	it('wait for marketing', async () => {
		await decided(await revised(1, 'approved'), 'approve', 'tomas');
		expect(await worklistOf('noor')).toMatchObject([
			{ title: 'Approved, to publish', items: [{ text: say.toPublish(1, 'tomas'), since: LATER }] }
		]);
		expect(await titlesOf('per')).toEqual([]);
	});

	it('do not wait for a person who both submitted and approved them', async () => {
		await decided(await revised(1, 'approved', 'lena', []), 'approve', 'lena');
		expect(await titlesOf('lena')).toEqual([]);
		expect(await titlesOf('noor')).toEqual(['Approved, to publish']);
	});
});

describe('work that failed', () => {
	const failed = (createdAt: string, dedupeKey = 'import:1', state: 'failed' | 'done' = 'failed') =>
		write(database.db, (tx) =>
			tx.insert(job).values({
				kind: 'import-measurement-set',
				payload: { product },
				dedupeKey,
				state,
				error: 'Line 7 has 3 fields.',
				createdBy: ENGINEER,
				createdAt,
				endedAt: createdAt
			})
		);

	it('stands with its reason for who started it, and leads to the product', async () => {
		await failed(LATER);
		expect(await worklistOf(ENGINEER)).toMatchObject([
			{
				title: 'Work that failed',
				items: [
					{
						partNumber: 'LKT-1130',
						text: say.failed('Importing a measurement set'),
						note: 'Line 7 has 3 fields.',
						href: '/products/LKT-1130/measurements'
					}
				]
			}
		]);
		expect(await titlesOf('lena')).toEqual([]);
	});

	it('leaves when it is tried again, and after a week', async () => {
		await failed(LATER);
		await failed(NOW, 'import:1', 'done');
		await failed('2026-11-20T09:00:00.000Z', 'import:2');
		expect(await titlesOf(ENGINEER)).toEqual([]);
	});
});

it('counts what stands in it and says since when the oldest waits', async () => {
	await setWithSuspects('accepted');
	await uploaded('read', 'a'.repeat(64));
	await decided(await revised(1, 'returned'), 'return', 'tomas');
	const groups = await worklistOf(ENGINEER);
	expect(countWaiting(groups)).toBe(3);
	expect(oldestSince(groups)).toBe(AT);
});
