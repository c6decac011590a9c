import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { canonicalBytes } from '$lib/core/datasheet/canonicalBytes';
import {
	concernLoosened,
	concernNoSecondRoute,
	concernRoutesDiffer,
	memoDiffers,
	memoMissing
} from '$lib/core/messages/verification';
import {
	documentDamaged,
	evidenceNotReady,
	flagNeedsComment,
	mayNotVerifyOwnEdit,
	mayNotVerifyOwnSubmission,
	reasonNeeded,
	revisionAlreadyOpen,
	revisionIsNot,
	rolesDoNotAllow,
	rowNotFound,
	rowsStillOpen
} from '$lib/core/messages/review';
import type { LimitRow } from '$lib/core/limits/limit';
import type { ComputedEvidence, VerificationEvidence } from '$lib/core/review/verificationEvidence';
import { findRevisionById } from '$lib/server/db/findRevision';
import { listComments } from '$lib/server/db/listComments';
import { listDecisions } from '$lib/server/db/listDecisions';
import { listVerificationRows } from '$lib/server/db/listVerificationRows';
import {
	audit,
	distribution,
	draft,
	draftEdit,
	limitMemo,
	revision as revisionTable,
	sweepBlock,
	templateVersion,
	verificationRow
} from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { commentOnRow } from '$lib/server/services/commentOnRow';
import { decideRevision } from '$lib/server/services/decideRevision';
import { freezeRevision } from '$lib/server/services/freezeRevision';
import { sha256 } from '$lib/server/services/sha256';
import { verifyEvidence } from '$lib/server/services/verifyEvidence';
import { tickLowRisk, verifyRow } from '$lib/server/services/verifyRow';
import { ENGINEER } from '../factories/acceptedSet';
import { approve, BIASES, documentOf, openReviewBench, submit } from '../factories/reviewBench';
import type { ReviewBench } from '../factories/reviewBench';

const AT_4_V = 'capacitance.25c.VR=4';
let bench: ReviewBench;

beforeEach(async () => {
	bench = await openReviewBench();
});
afterEach(() => bench.close());

const freeze = (document: ReturnType<typeof documentOf>, by: string = ENGINEER) =>
	freezeRevision(bench.stores, {
		product: bench.product,
		resolved: { document, slots: [], problems: [] },
		by
	});

async function evidenceAt(revision: number, row: string) {
	const rows = await listVerificationRows(bench.stores.db, revision);
	const found = rows.find((entry) => entry.row === row);
	if (found === undefined) throw new Error(`no row ${row}`);
	return found.evidence;
}

function done(computed: ComputedEvidence | null) {
	if (computed?.status !== 'done') throw new Error(`evidence is ${computed?.status ?? 'missing'}`);
	return computed;
}

describe('submitting', () => {
	it('stores the canonical bytes and their hash', async () => {
		const document = documentOf(await bench.limitRows());
		const stored = await findRevisionById(bench.stores.db, await submit(bench, document));
		expect(Buffer.from(canonicalBytes(document)).equals(stored?.document ?? Buffer.of())).toBe(
			true
		);
		expect(stored?.sha256).toBe(sha256(canonicalBytes(document)));
		expect(stored).toMatchObject({ number: 1, state: 'inReview', submittedBy: ENGINEER });
	});

	it('refuses a second one while the first is open, with every other reason', async () => {
		const document = documentOf(await bench.limitRows());
		await submit(bench, document);
		const outcome = await freezeRevision(bench.stores, {
			product: bench.product,
			resolved: {
				document,
				slots: [],
				problems: [
					{ place: 'a', label: 'V_R', message: 'unbound' },
					{ place: 'b', label: 'Features', message: 'too long' }
				]
			},
			by: ENGINEER
		});
		expect(outcome).toEqual({
			status: 'refused',
			problems: [revisionAlreadyOpen(1, 'in review'), 'V_R: unbound', 'Features: too long']
		});
	});

	it('lets one of two at the same moment through', async () => {
		const document = documentOf(await bench.limitRows());
		const outcomes = await Promise.all([freeze(document), freeze(document)]);
		expect(outcomes.map(({ status }) => status).toSorted()).toEqual(['refused', 'submitted']);
	});

	it('writes the audit in the same transaction', async () => {
		await submit(bench, documentOf(await bench.limitRows()));
		const rows = await bench.stores.db
			.select()
			.from(audit)
			.where(eq(audit.action, 'revision.submit'));
		expect(rows.map(({ subject, by }) => [subject, by])).toEqual([
			['LKT-1130 revision 1', ENGINEER]
		]);
	});
});

describe('evidence by the second route', () => {
	it('agrees with the engine on every printed number, and says so', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		for (const bias of BIASES) {
			const evidence = await evidenceAt(id, `capacitance.25c.VR=${bias}`);
			const { checks, devices, independentLots, outside, lots } = done(evidence.computed);
			expect([devices, independentLots, lots.length]).toEqual([300, 3, 3]);
			for (const check of Object.values(checks)) expect(check?.agrees).toBe(true);
			// SciPy: k = nct.ppf(0.975, 299, norm.ppf(0.99)*sqrt(300))/sqrt(300), 300*norm.cdf(-k)
			// = 1.56447; R: qbinom(0.95, 300, 0.005214883615) = 4
			expect(outside.minimum?.allowed).toBe(4);
			expect(outside.minimum?.expected).toBeCloseTo(1.5644650844, 8);
			expect(evidence.risk).toBe('low');
		}
	});

	it('has the raw limit of the engine to nine digits', async () => {
		const rows = await bench.limitRows();
		const id = await submit(bench, documentOf(rows));
		const row = rows.find(({ condition }) => condition.reverseVoltage === 4);
		const { checks } = done((await evidenceAt(id, AT_4_V)).computed);
		// The stated uncertainty of 0.3 % goes outwards after the raw limit.
		expect((checks.minimum?.value ?? 0) / (((row?.minimum?.raw ?? 0) / 1e-12) * 0.997)).toBeCloseTo(
			1,
			9
		);
		expect((checks.maximum?.value ?? 0) / (((row?.maximum?.raw ?? 0) / 1e-12) * 1.003)).toBeCloseTo(
			1,
			9
		);
	});

	it('counts the devices beyond a limit and names them', async () => {
		const rows = await bench.limitRows();
		const tight = rows.map((row): LimitRow => {
			if (row.condition.reverseVoltage !== 4 || row.typical === null) return row;
			return { ...row, minimum: { ...row.typical, derivation: [] } };
		});
		await write(bench.stores.db, async (tx) => {
			const row = tight.find(({ condition }) => condition.reverseVoltage === 4);
			await tx
				.update(limitMemo)
				.set({ result: row })
				.where(eq(limitMemo.inputHash, row?.inputHash ?? ''));
		});
		const id = await submit(bench, documentOf(tight));
		const evidence = await evidenceAt(id, AT_4_V);
		const { outside, devicesOutside } = done(evidence.computed);
		// The typical value is the median, rounded: close to half of the devices lie below it.
		expect(outside.minimum?.count).toBeGreaterThan(100);
		expect(devicesOutside).toHaveLength(100);
		expect(devicesOutside[0]?.beyondPercent).toBeLessThan(devicesOutside[99]?.beyondPercent ?? 0);
		expect(evidence.risk).toBe('high');
	});

	it('flags a stored limit that was tampered with before submission', async () => {
		const [row] = (await bench.limitRows()).filter(
			({ condition }) => condition.reverseVoltage === 4
		);
		if (!row?.minimum) throw new Error('no minimum');
		const text = (Number(row.minimum.text) + 0.5).toFixed(2);
		const tampered = {
			...row,
			minimum: { ...row.minimum, text, printed: Number(text) * row.unitScale }
		};
		await write(bench.stores.db, (tx) =>
			tx.update(limitMemo).set({ result: tampered }).where(eq(limitMemo.inputHash, row.inputHash))
		);
		const id = await submit(bench, documentOf(await bench.limitRows()));
		const evidence = await evidenceAt(id, AT_4_V);
		const check = done(evidence.computed).checks.minimum;
		expect(check?.agrees).toBe(false);
		expect(evidence.risk).toBe('high');
		expect(evidence.concerns).toContain(
			concernRoutesDiffer('minimum', check?.deviationPercent ?? 0)
		);
	});

	it('flags a limit computed from a distribution that was tampered with', async () => {
		const rows = await bench.stores.db.select().from(distribution);
		await write(bench.stores.db, async (tx) => {
			for (const { id, summary } of rows) {
				const stored = summary as { standardDeviation: number };
				await tx
					.update(distribution)
					.set({ summary: { ...stored, standardDeviation: stored.standardDeviation / 2 } })
					.where(eq(distribution.id, id));
			}
		});
		const id = await submit(bench, documentOf(await bench.limitRows()));
		const evidence = await evidenceAt(id, AT_4_V);
		expect(done(evidence.computed).checks.minimum?.agrees).toBe(false);
		expect(done(evidence.computed).checks.typical?.agrees).toBe(true);
		expect(evidence.risk).toBe('high');
	});

	it('flags measurements that changed below a stored limit', async () => {
		const document = documentOf(await bench.limitRows());
		const [block] = await bench.stores.db.select().from(sweepBlock);
		const bytes = Buffer.from(block?.values ?? []);
		for (let row = 0; row < 300; row++) {
			const at = (row * BIASES.length + 1) * 8;
			bytes.writeDoubleLE(bytes.readDoubleLE(at) * 1.05, at);
		}
		await write(bench.stores.db, (tx) => tx.update(sweepBlock).set({ values: bytes }));
		const id = await submit(bench, document);
		expect((await evidenceAt(id, AT_4_V)).risk).toBe('high');
		expect((await evidenceAt(id, 'capacitance.25c.VR=1')).risk).toBe('low');
	});

	it('says when the stored limit is another than is printed, or gone', async () => {
		const rows = await bench.limitRows();
		const document = documentOf(rows);
		const [row] = rows.filter(({ condition }) => condition.reverseVoltage === 4);
		if (!row?.maximum) throw new Error('no maximum');
		await write(bench.stores.db, async (tx) => {
			await tx
				.update(limitMemo)
				.set({ result: { ...row, maximum: { ...row.maximum, text: '99.9' } } })
				.where(eq(limitMemo.inputHash, row.inputHash));
			await tx.delete(limitMemo).where(eq(limitMemo.inputHash, rows[0]?.inputHash ?? ''));
		});
		const id = await submit(bench, document);
		expect((await evidenceAt(id, AT_4_V)).concerns).toEqual([
			concernNoSecondRoute(memoDiffers('99.9'))
		]);
		expect((await evidenceAt(id, 'capacitance.25c.VR=1')).concerns).toEqual([
			concernNoSecondRoute(memoMissing())
		]);
	});
});

describe('rows that nothing measured stands behind', () => {
	it('are ratings, digits in text and struck-out places, each to be ticked singly', async () => {
		const document = documentOf(await bench.limitRows());
		const outcome = await freezeRevision(bench.stores, {
			product: bench.product,
			resolved: {
				document,
				slots: [
					{
						id: 'characteristics.leakage',
						slot: 'characteristics.leakage',
						bias: null,
						section: 6,
						kind: 'limit',
						label: 'I_R at V_R = 28 V',
						state: 'struck out',
						essential: true,
						required: ['maximum'],
						prints: null,
						current: null,
						binding: {
							kind: 'struck-out',
							reason: 'not measured yet',
							by: 'Ida Sandvik',
							at: '2026-01-06T08:00:00.000Z'
						},
						problem: null,
						warnings: []
					}
				],
				problems: []
			},
			by: ENGINEER
		});
		if (outcome.status === 'refused') throw new Error(outcome.problems.join());
		const rows = await listVerificationRows(bench.stores.db, outcome.revision.id);
		const unmeasured = rows.filter(({ evidence }) => evidence.computed === null);
		expect(unmeasured.map(({ row, evidence }) => [row, evidence.kind, evidence.risk])).toEqual([
			['ratings.reverse-voltage', 'rating', 'high'],
			['ratings.power', 'rating', 'high'],
			['ratings.storage-temperature', 'rating', 'high'],
			['characteristics.leakage', 'struck out', 'high'],
			['headline.1', 'text', 'high'],
			['features.2', 'text', 'high']
		]);
		expect(rows.find(({ row }) => row === 'headline.1')?.evidence.digits).toEqual(['1', '28']);
	});
});

describe('verifying', () => {
	it('ticks low-risk rows as a group and leaves the others', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		expect(await tickLowRisk(bench.stores, { revision: id, by: 'tomas' })).toEqual({
			status: 'verified',
			rows: BIASES.length
		});
		const rows = await listVerificationRows(bench.stores.db, id);
		const ticked = rows.filter(({ state }) => state === 'ticked').map(({ row }) => row);
		expect(ticked).toEqual(BIASES.map((bias) => `capacitance.25c.VR=${bias}`));
		expect(rows.find(({ row }) => row === AT_4_V)).toMatchObject({ by: 'tomas', byName: 'tomas' });
	});

	it('flags with what is wrong, and opens again', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		const verify = (verdict: 'flag' | 'clear', text?: string) =>
			verifyRow(bench.stores, {
				revision: id,
				row: AT_4_V,
				verdict,
				by: 'tomas',
				...(text === undefined ? {} : { text })
			});
		expect(await verify('flag')).toEqual({ status: 'refused', message: flagNeedsComment() });
		expect((await verify('flag', 'Five come from one wafer.')).status).toBe('verified');
		expect((await listComments(bench.stores.db, id)).map(({ row, text }) => [row, text])).toEqual([
			[AT_4_V, 'Five come from one wafer.']
		]);
		await verify('clear');
		const rows = await listVerificationRows(bench.stores.db, id);
		expect(rows.find(({ row }) => row === AT_4_V)).toMatchObject({ state: 'open', by: null });
	});

	it.each([
		['the submitter, whatever their roles', 'lena', 'lena', mayNotVerifyOwnSubmission()],
		['somebody without the role', ENGINEER, 'noor', rolesDoNotAllow('verify rows')],
		['the administrator', ENGINEER, 'per', rolesDoNotAllow('verify rows')]
	])('is refused to %s', async (_who, submitter, verifier, message) => {
		const id = await submit(bench, documentOf(await bench.limitRows()), submitter);
		expect(
			await verifyRow(bench.stores, { revision: id, row: AT_4_V, verdict: 'tick', by: verifier })
		).toEqual({ status: 'refused', message });
		expect(await tickLowRisk(bench.stores, { revision: id, by: verifier })).toEqual({
			status: 'refused',
			message
		});
	});

	it('refuses a row that is not on the sheet', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		expect(
			await verifyRow(bench.stores, { revision: id, row: 'nowhere', verdict: 'tick', by: 'tomas' })
		).toEqual({ status: 'refused', message: rowNotFound('nowhere') });
		expect(
			await commentOnRow(bench.stores, { revision: id, row: 'nowhere', text: 'x', by: 'noor' })
		).toEqual({ status: 'refused', message: rowNotFound('nowhere') });
	});
});

describe('deciding', () => {
	it('needs every row ticked', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		await tickLowRisk(bench.stores, { revision: id, by: 'tomas' });
		await verifyRow(bench.stores, {
			revision: id,
			row: 'ratings.power',
			verdict: 'flag',
			text: 'Which board?',
			by: 'tomas'
		});
		expect(
			await decideRevision(bench.stores, { revision: id, decision: 'approve', by: 'tomas' })
		).toEqual({ status: 'refused', message: rowsStillOpen(4, 1) });
	});

	it('approves what is ticked, once', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		await approve(bench, id);
		expect((await findRevisionById(bench.stores.db, id))?.state).toBe('approved');
		expect(
			await decideRevision(bench.stores, { revision: id, decision: 'approve', by: 'tomas' })
		).toEqual({ status: 'refused', message: revisionIsNot(1, 'approved', 'approved') });
	});

	it('returns with a reason, and the next submission is a new revision', async () => {
		const document = documentOf(await bench.limitRows());
		const id = await submit(bench, document);
		const back = (reason: string) =>
			decideRevision(bench.stores, { revision: id, decision: 'return', reason, by: 'tomas' });
		expect(await back(' ')).toEqual({ status: 'refused', message: reasonNeeded() });
		expect(await back('Wafer 07 first.')).toEqual({ status: 'returned' });
		expect(
			(await listDecisions(bench.stores.db, id)).map(({ event, reason }) => [event, reason])
		).toEqual([
			['submit', ''],
			['return', 'Wafer 07 first.']
		]);
		const again = await findRevisionById(bench.stores.db, await submit(bench, document));
		expect(again?.number).toBe(2);
		expect(await back('Once more.')).toEqual({
			status: 'refused',
			message: revisionIsNot(1, 'returned', 'returned')
		});
	});

	it('refuses whoever edited the draft since the last release', async () => {
		await write(bench.stores.db, async (tx) => {
			await tx.insert(templateVersion).values({
				id: 1,
				template: 'tuning',
				number: 1,
				json: {},
				hash: '-',
				createdAt: '2026-01-05T08:00:00.000Z'
			});
			await tx.insert(draft).values({
				id: 1,
				product: bench.product.id,
				templateVersion: 1,
				status: 'production',
				policyVersion: 1,
				createdAt: '2026-01-05T08:00:00.000Z'
			});
			await tx.insert(draftEdit).values({
				draft: 1,
				person: 'lena',
				what: 'features',
				at: '2026-01-06T08:00:00.000Z'
			});
		});
		const id = await submit(bench, documentOf(await bench.limitRows()));
		expect((await findRevisionById(bench.stores.db, id))?.editors).toEqual(['lena']);
		expect(
			await decideRevision(bench.stores, {
				revision: id,
				decision: 'return',
				reason: 'no',
				by: 'lena'
			})
		).toEqual({ status: 'refused', message: mayNotVerifyOwnEdit() });
	});

	it('refuses to approve bytes that no longer match their hash', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		for (const { row } of await listVerificationRows(bench.stores.db, id))
			await verifyRow(bench.stores, { revision: id, row, verdict: 'tick', by: 'tomas' });
		const stored = await findRevisionById(bench.stores.db, id);
		const bytes = Buffer.from((stored?.document.toString() ?? '').replace('Hyperabrupt', 'Abrupt'));
		await write(bench.stores.db, (tx) =>
			tx.update(revisionTable).set({ document: bytes }).where(eq(revisionTable.id, id))
		);
		expect(
			await decideRevision(bench.stores, { revision: id, decision: 'approve', by: 'tomas' })
		).toEqual({ status: 'refused', message: documentDamaged() });
	});
});

it('has words for a loosened part', () => {
	expect(concernLoosened('minimum')).toBe('Minimum is loosened against the release before.');
});

describe('evidence that a job gathers', () => {
	it('fills in what was left pending, so that it can be ticked', async () => {
		const id = await submit(bench, documentOf(await bench.limitRows()));
		const before = await evidenceAt(id, AT_4_V);
		const pending: VerificationEvidence = {
			...before,
			computed: { status: 'pending' },
			risk: 'pending'
		};
		await write(bench.stores.db, (tx) =>
			tx.update(verificationRow).set({ evidence: pending }).where(eq(verificationRow.row, AT_4_V))
		);
		const tick = () =>
			verifyRow(bench.stores, { revision: id, row: AT_4_V, verdict: 'tick', by: 'tomas' });
		expect(await tick()).toEqual({ status: 'refused', message: evidenceNotReady() });
		expect(
			await verifyEvidence(
				bench.stores,
				{ revision: id },
				{ id: 1, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
			)
		).toEqual({ rows: 1 });
		expect(await evidenceAt(id, AT_4_V)).toEqual(before);
		expect((await tick()).status).toBe('verified');
	});
});
