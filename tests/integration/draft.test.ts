import { mkdtempSync, rmSync } from 'node:fs';
import { writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { asc, eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { RefusalError } from '$lib/core/errors';
import { draftMessages } from '$lib/core/messages/datasheet';
import { TemplateError } from '$lib/core/template/readTemplate';
import { findDraft } from '$lib/server/db/findDraft';
import { listPolicies } from '$lib/server/db/findPolicies';
import { listTemplates, listTemplateVersions } from '$lib/server/db/findTemplates';
import {
	audit,
	draftEdit,
	job,
	measurementSet,
	product,
	templateVersion
} from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { bindEverything } from '$lib/server/services/bindEverything';
import { bindSlot } from '$lib/server/services/bindSlot';
import { changeDraftSettings } from '$lib/server/services/changeDraftSettings';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { drawProof } from '$lib/server/services/drawProof';
import { ensureTemplates } from '$lib/server/services/ensureTemplates';
import { keepBound } from '$lib/server/services/keepBound';
import { openDraft } from '$lib/server/services/openDraft';
import { fitSweepsJob } from '$lib/server/services/fitSweepsJob';
import { renderProof } from '$lib/server/services/renderProof';
import { resolveDraft } from '$lib/server/services/resolveDraft';
import { setRating } from '$lib/server/services/setRating';
import { clearSlot, strikeOut } from '$lib/server/services/strikeOut';
import { submitRevision } from '$lib/server/services/submitRevision';
import { writeText } from '$lib/server/services/writeText';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import { ENGINEER, insertAcceptedSet } from '../factories/acceptedSet';
import { BIASES, openReviewBench, PART, type ReviewBench } from '../factories/reviewBench';

let bench: ReviewBench;
let policyVersion: number;
const me = { partNumber: PART, by: ENGINEER };

beforeEach(async () => {
	bench = await openReviewBench();
	await ensureTemplates(bench.stores);
	const policies = await listPolicies(bench.stores.db);
	policyVersion = policies.find(({ rules }) => rules.method === 'normal')?.id ?? 0;
});

afterEach(() => bench.close());

const open = () =>
	openDraft(bench.stores, { ...me, template: 'tuning', policyVersion, status: 'production' });

const slotAt = async (id: string) => {
	const { slots } = await resolveDraft(bench.stores.db, bench.product.id);
	const found = slots.find((slot) => slot.id === id);
	if (found === undefined) throw new Error(`no slot ${id}`);
	return found;
};

/** A second upload whose devices lie 10 % higher: the limits move. */
async function acceptMore(): Promise<void> {
	const devices = ['LK26-023', 'LK26-027', 'LK26-031'].flatMap((lot) =>
		Array.from({ length: 40 }, (_, index) => ({ lot, wafer: '01', name: String(index) }))
	);
	const picofarads = Float64Array.from(
		devices.flatMap((_, index) =>
			BIASES.map((bias) =>
				Number((44 * (1 + bias / 2) ** -1.1 * (1 + ((index % 9) - 4) / 200)).toFixed(3))
			)
		)
	);
	await insertAcceptedSet(bench.stores.db, {
		product: bench.product.id,
		sha256: '6'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: 1e6,
		picofarads: new Map([[25, picofarads]])
	});
	await recompute();
}

const recompute = () =>
	computeDistributions(
		bench.stores,
		{ product: bench.product.id },
		{ id: 2, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);

describe('the templates', () => {
	it('are imported once, and again as a next version where a file changed', async () => {
		const { db } = bench.stores;
		await ensureTemplates(bench.stores);
		expect((await listTemplates(db)).map(({ key, number }) => [key, number])).toEqual([
			['detector-mixer', 1],
			['pin', 1],
			['rectifier', 1],
			['switching', 1],
			['tuning', 1]
		]);

		const folder = mkdtempSync(join(tmpdir(), 'platen-templates-'));
		try {
			const [stored] = await listTemplateVersions(db, 'tuning');
			const renamed = JSON.stringify({ ...stored?.template, name: 'Varactor' });
			await writeFile(join(folder, 'tuning.json'), renamed);
			await ensureTemplates(bench.stores, folder);
			await ensureTemplates(bench.stores, folder);
			const versions = await listTemplateVersions(db, 'tuning');
			expect(versions.map(({ number, template }) => [number, template.name])).toEqual([
				[2, 'Varactor'],
				[1, 'Tuning diode']
			]);

			await writeFile(join(folder, 'tuning.json'), '{"key":1}');
			await expect(ensureTemplates(bench.stores, folder)).rejects.toThrow(TemplateError);
			expect(await db.select().from(templateVersion)).toHaveLength(6);
		} finally {
			rmSync(folder, { recursive: true });
		}
	});
});

describe('opening a draft', () => {
	it('takes the newest template and records who did it', async () => {
		expect(await open()).toMatchObject({ status: 'opened' });
		const draft = await findDraft(bench.stores.db, bench.product.id);
		expect(draft).toMatchObject({ templateNumber: 1, status: 'production', policyVersion });
		expect(draft?.bindings.size).toBe(0);
		expect(await touches()).toEqual(['open']);
	});

	it.each([
		['a product nobody has', { partNumber: 'LKT-9' }, draftMessages.productUnknown('LKT-9')],
		['a template nobody has', { template: 'zener' }, draftMessages.templateUnknown('zener')],
		[
			'a template of another class',
			{ template: 'rectifier' },
			draftMessages.templateOfOtherClass('Schottky rectifier', 'Tuning diode')
		],
		['a policy nobody has', { policyVersion: 99 }, draftMessages.policyVersionUnknown()]
	])('refuses %s', async (_, changes, message) => {
		const wanted = { ...me, template: 'tuning', policyVersion, status: 'target' as const };
		expect(await openDraft(bench.stores, { ...wanted, ...changes })).toEqual({
			status: 'refused',
			message
		});
	});

	it('refuses a second one', async () => {
		await open();
		expect(await open()).toEqual({
			status: 'refused',
			message: draftMessages.draftAlreadyOpen(PART)
		});
	});

	it('comes before everything else', async () => {
		const message = draftMessages.noDraft(PART);
		expect(await bindEverything(bench.stores, me)).toEqual({ status: 'refused', message });
		await expect(resolveDraft(bench.stores.db, bench.product.id)).rejects.toThrow(
			new RefusalError(message)
		);
	});
});

describe('binding everything that matches', () => {
	it('binds what is measured, and says of each other place why not', async () => {
		await open();
		const outcome = await bindEverything(bench.stores, me);
		if (outcome.status !== 'bound') throw new Error(outcome.message);
		expect(outcome.bound).toEqual([
			'C_tot at V_R = 1\u00a0V, f = 1\u00a0MHz, T_j = 25\u00a0°C',
			// 1, 4 and 15 V were measured; the others lie between and are interpolated.
			...[1, 2, 3, 4, 6, 8, 10, 12, 15].map(
				(bias) => `C_tot at V_R = ${bias}\u00a0V, T_j = 25\u00a0°C`
			)
		]);
		const why = new Map(outcome.left.map((left) => [left.label, left.why]));
		expect(why.get('V_R')).toBe(draftMessages.ratingIsTyped());
		expect(why.get('C_tot at V_R = 28\u00a0V, T_j = 25\u00a0°C')).toMatch(
			/28 V lies outside of the measured range, 1 V to 15 V/
		);
		expect(why.get('r_s at V_R = 4\u00a0V, f = 470\u00a0MHz, T_j = 25\u00a0°C')).toMatch(
			/No stored measurement gives r_s/
		);
		expect(outcome.bound.length + outcome.left.length).toBe(29);
	});

	it('prints the engine’s own digits, with their trace', async () => {
		await open();
		await bindEverything(bench.stores, me);
		for (const row of await bench.limitRows()) {
			const slot = await slotAt(`capacitance.25c.VR=${row.condition.reverseVoltage}`);
			expect(slot).toMatchObject({
				state: 'bound',
				prints: { minimum: row.minimum?.text, maximum: row.maximum?.text, unit: 'pF' },
				current: { inputHash: row.inputHash, sampleSize: 300, independentLots: 3 }
			});
		}
	});

	it('touches nothing the second time', async () => {
		await open();
		await bindEverything(bench.stores, me);
		const again = await bindEverything(bench.stores, me);
		expect(again).toMatchObject({ status: 'bound', bound: [] });
		expect(await touches()).toEqual(['open', 'everything that matches']);
	});
});

describe('binding one place', () => {
	beforeEach(open);
	const place = 'capacitance.25c.VR=4';

	it('keeps a declared basis with what stands behind it', async () => {
		const refused = await bindSlot(bench.stores, { ...me, place, basis: 'tested' });
		expect(refused).toEqual({
			status: 'refused',
			message: draftMessages.basisNeedsReason('tested on every device')
		});
		const basisReason = 'final test, program 7';
		const bound = await bindSlot(bench.stores, { ...me, place, basis: 'tested', basisReason });
		expect(bound.status).toBe('bound');
		expect(await slotAt(place)).toMatchObject({
			state: 'bound',
			binding: { kind: 'limit', basis: 'tested', basisReason }
		});
	});

	it('as typical prints the typical value alone', async () => {
		await bindSlot(bench.stores, { ...me, place, basis: 'typical' });
		expect(await slotAt(place)).toMatchObject({
			state: 'bound',
			prints: { minimum: null, maximum: null }
		});
		const needsAll = 'characteristics.capacitance-1v';
		expect(
			await bindSlot(bench.stores, { ...me, place: needsAll, basis: 'typical' })
		).toMatchObject({
			status: 'refused'
		});
	});

	it('refuses what was not measured, what is no limit, and what is nowhere', async () => {
		const refusalOf = async (id: string) => {
			const outcome = await bindSlot(bench.stores, { ...me, place: id });
			return outcome.status === 'refused' ? outcome.message : outcome.status;
		};
		expect(await refusalOf('capacitance.25c.VR=28')).toMatch(/28 V lies outside/);
		expect(await refusalOf('characteristics.series-resistance')).toMatch(/No stored measurement/);
		expect(await refusalOf('ratings.power')).toMatch(/can’t be filled with a limit/);
		expect(await refusalOf('capacitance.25c.VR=5')).toBe(
			draftMessages.slotUnknown('capacitance.25c.VR=5')
		);
	});

	it('refuses numbers that moved while somebody looked', async () => {
		expect(await bindSlot(bench.stores, { ...me, place, expected: 'older' })).toEqual({
			status: 'refused',
			message: draftMessages.movedMeanwhile()
		});
	});
});

describe('newer data', () => {
	const place = 'capacitance.25c.VR=4';

	beforeEach(async () => {
		await open();
		await bindEverything(bench.stores, me);
		await acceptMore();
	});

	it('make what they move stale, and what was bound stays printed', async () => {
		const before = (await openedRows()).get('4');
		const slot = await slotAt(place);
		expect(slot).toMatchObject({ state: 'stale', prints: { minimum: before } });
		expect(slot.current?.minimum).not.toBe(before);
		const { problems } = await resolveDraft(bench.stores.db, bench.product.id);
		expect(problems).toContainEqual(
			expect.objectContaining({ place, message: draftMessages.settleStale() })
		);
	});

	it('can be bound', async () => {
		const expected = (await slotAt(place)).current?.inputHash;
		expect(await bindSlot(bench.stores, { ...me, place, expected })).toMatchObject({
			status: 'bound'
		});
		expect((await slotAt(place)).state).toBe('bound');
	});

	it('can be overridden with a reason, by somebody, until they move again', async () => {
		expect(await keepBound(bench.stores, { ...me, place, reason: ' ' })).toEqual({
			status: 'refused',
			message: draftMessages.reasonNeeded()
		});
		expect(await keepBound(bench.stores, { ...me, place, reason: 'trial lots' })).toEqual({
			status: 'kept'
		});
		expect(await slotAt(place)).toMatchObject({
			state: 'overridden',
			binding: { kept: { reason: 'trial lots', by: 'Ida Sandvik' } }
		});
		expect(await keepBound(bench.stores, { ...me, place, reason: 'again' })).toMatchObject({
			status: 'refused'
		});
	});

	it('that go away again leave it bound', async () => {
		await write(bench.stores.db, (tx) =>
			tx
				.update(measurementSet)
				.set({ state: 'retired' })
				.where(eq(measurementSet.id, 2))
				.then(() => undefined)
		);
		await recompute();
		expect((await slotAt(place)).state).toBe('bound');
	});

	/** What was bound before the data moved, by bias: the binding's own texts. */
	async function openedRows(): Promise<Map<string, string | null>> {
		const draft = await findDraft(bench.stores.db, bench.product.id);
		const table = draft?.bindings.get('capacitance.25c');
		const rows = table?.kind === 'table' ? table.rows : [];
		return new Map(
			rows.map(({ bias, binding }) => [
				String(bias),
				binding.kind === 'limit' ? binding.printed.minimum : null
			])
		);
	}
});

describe('a rating', () => {
	beforeEach(open);
	const typed = { slot: 'ratings.junction-temperature', reason: 'mould compound' };

	it('is rounded so that it claims less, and says so', async () => {
		const outcome = await setRating(bench.stores, {
			...me,
			...typed,
			minimum: '-55.5',
			maximum: '150.9'
		});
		expect(outcome).toEqual({
			status: 'set',
			minimum: '−55',
			maximum: '150',
			remark: draftMessages.ratingStep('−55, 150', 1)
		});
		expect(await slotAt(typed.slot)).toMatchObject({
			state: 'bound',
			prints: { minimum: '−55', maximum: '150', unit: '°C' }
		});
	});

	it.each([
		['no reason', { reason: '' }, draftMessages.reasonNeeded()],
		['an end missing', { minimum: '' }, draftMessages.ratingEnds(['minimum'])],
		['words', { maximum: 'hot' }, draftMessages.ratingEnds(['maximum'])],
		['ends the wrong way round', { minimum: '160' }, draftMessages.ratingEndsOrder()],
		['no such place', { slot: 'ratings.x' }, draftMessages.slotUnknown('ratings.x')]
	])('is refused for %s', async (_, changes, message) => {
		const wanted = { ...me, ...typed, minimum: '-55', maximum: '150', ...changes };
		expect(await setRating(bench.stores, wanted)).toEqual({ status: 'refused', message });
	});
});

describe('striking out', () => {
	beforeEach(open);

	it('needs a reason, keeps who gave it, and can be taken back', async () => {
		const place = 'characteristics.series-resistance';
		expect(await strikeOut(bench.stores, { ...me, place, reason: '' })).toMatchObject({
			message: draftMessages.reasonNeeded()
		});
		expect(await strikeOut(bench.stores, { ...me, place: 'nowhere', reason: 'x' })).toMatchObject({
			message: draftMessages.slotUnknown('nowhere')
		});
		await strikeOut(bench.stores, { ...me, place, reason: 'no set-up' });
		expect(await slotAt(place)).toMatchObject({
			state: 'struck out',
			binding: { reason: 'no set-up', by: 'Ida Sandvik' }
		});
		await clearSlot(bench.stores, { ...me, place });
		expect((await slotAt(place)).state).toBe('unbound');
	});

	it('of one row leaves the others of the table as they are', async () => {
		await bindEverything(bench.stores, me);
		await strikeOut(bench.stores, { ...me, place: 'capacitance.25c.VR=4', reason: 'x' });
		expect((await slotAt('capacitance.25c.VR=4')).state).toBe('struck out');
		expect((await slotAt('capacitance.25c.VR=15')).state).toBe('bound');
	});
});

describe('writing', () => {
	beforeEach(open);
	const block = 'features';

	it('counts each block’s own versions', async () => {
		const first = await writeText(bench.stores, {
			...me,
			block,
			text: 'One\r\nTwo ',
			rowVersion: 0
		});
		expect(first).toEqual({ status: 'written', rowVersion: 1 });
		const draft = await findDraft(bench.stores.db, bench.product.id);
		expect(draft?.texts.get(block)).toEqual({ text: 'One\nTwo', rowVersion: 1 });
		expect(await touches()).toEqual(['open', 'text features']);
	});

	it('shows the second of two writers both texts, and loses neither', async () => {
		await writeText(bench.stores, { ...me, block, text: 'Ida’s', rowVersion: 0 });
		const noor = { partNumber: PART, by: 'noor', block, text: 'Noor’s' };
		expect(await writeText(bench.stores, { ...noor, rowVersion: 0 })).toEqual({
			status: 'conflict',
			message: draftMessages.writtenMeanwhile('Ida Sandvik'),
			theirs: 'Ida’s',
			rowVersion: 1,
			yours: 'Noor’s'
		});
		const draft = await findDraft(bench.stores.db, bench.product.id);
		expect(draft?.texts.get(block)?.text).toBe('Ida’s');
		expect(await writeText(bench.stores, { ...noor, rowVersion: 1 })).toEqual({
			status: 'written',
			rowVersion: 2
		});
	});

	it('refuses characters that would print as a box, and blocks that are nowhere', async () => {
		expect(await writeText(bench.stores, { ...me, block, text: 'snow ☃', rowVersion: 0 })).toEqual({
			status: 'refused',
			message: draftMessages.charactersMissing(['“☃” (U+2603)'])
		});
		expect(
			await writeText(bench.stores, { ...me, block: 'poem', text: 'x', rowVersion: 0 })
		).toMatchObject({ message: draftMessages.blockUnknown('poem') });
	});
});

describe('every touch', () => {
	it('is recorded with its person, in the draft and in the audit trail', async () => {
		await open();
		await setRating(bench.stores, {
			...me,
			slot: 'ratings.reverse-voltage',
			minimum: '',
			maximum: '30',
			reason: 'design rule'
		});
		await writeText(bench.stores, {
			partNumber: PART,
			by: 'noor',
			block: 'features',
			text: 'x',
			rowVersion: 0
		});
		await changeDraftSettings(bench.stores, { ...me, status: 'target', policyVersion });
		const edits = await bench.stores.db.select().from(draftEdit).orderBy(asc(draftEdit.id));
		expect(edits.map(({ person, what }) => [person, what])).toEqual([
			[ENGINEER, 'open'],
			[ENGINEER, 'continuous reverse voltage'],
			['noor', 'text features'],
			[ENGINEER, 'settings']
		]);
		const said = await bench.stores.db.select().from(audit).orderBy(asc(audit.seq));
		expect(said.slice(-4).map(({ action, by }) => [action, by])).toEqual([
			['draft.open', ENGINEER],
			['draft.rate', ENGINEER],
			['draft.write', 'noor'],
			['draft.settings', ENGINEER]
		]);
	});
});

describe('submitting', () => {
	it('is refused with everything that is open, each by its place', async () => {
		await open();
		await bindEverything(bench.stores, me);
		const outcome = await submitRevision(bench.stores, me);
		if (outcome.status !== 'refused') throw new Error('submitted');
		expect(outcome.problems).toContain(`V_R: ${draftMessages.essentialUnbound()}`);
		expect(outcome.problems).toContain(
			`C_tot at V_R = 28\u00a0V, T_j = 25\u00a0°C: ${draftMessages.essentialUnbound()}`
		);
	});
});

describe('the proof as a PDF', () => {
	const draw = () => drawProof(bench.stores, { ...me, waitMilliseconds: 0 });
	const work = () =>
		runOpenJobs(bench.stores, { 'render-proof': renderProof, 'fit-sweeps': fitSweepsJob });

	it('is drawn once for a content, and anew when the draft changes', async () => {
		await open();
		await bindEverything(bench.stores, me);
		expect(await draw()).toMatchObject({ status: 'late' });
		expect(await draw()).toMatchObject({ status: 'late' });
		await work();
		const drawn = await draw();
		if (drawn.status !== 'drawn') throw new Error(drawn.status);
		const pdf = await bench.stores.storage.read(drawn.key);
		expect(pdf.subarray(0, 5).toString()).toBe('%PDF-');
		expect(await draw()).toEqual(drawn);
		expect(await jobs()).toBe(1);

		await clearSlot(bench.stores, { ...me, place: 'capacitance.25c.VR=4' });
		expect(await draw()).toMatchObject({ status: 'late' });
		await work();
		const anew = await draw();
		expect(anew.status).toBe('drawn');
		expect(anew).not.toEqual(drawn);
		expect(await jobs()).toBe(2);
	});

	it('is refused without a draft', async () => {
		expect(await draw()).toEqual({ status: 'refused', message: draftMessages.noDraft(PART) });
	});

	async function jobs(): Promise<number> {
		return (await bench.stores.db.select().from(job).where(eq(job.kind, 'render-proof'))).length;
	}
});

it('a product without measurements has a draft that binds nothing', async () => {
	await write(bench.stores.db, (tx) =>
		tx
			.update(product)
			.set({ basisHash: null })
			.then(() => undefined)
	);
	await open();
	expect(await bindEverything(bench.stores, me)).toMatchObject({ status: 'bound', bound: [] });
});

async function touches(): Promise<string[]> {
	const edits = await bench.stores.db.select().from(draftEdit).orderBy(asc(draftEdit.id));
	return edits.map(({ what }) => what);
}
