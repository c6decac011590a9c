import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { eq } from 'drizzle-orm';
import { draftMessages } from '$lib/core/messages/datasheet';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import { normalQuantile } from '$lib/core/stats/normalQuantile';
import type { LimitPolicy } from '$lib/core/limits/policy';
import type { OpenDatabase } from '$lib/server/db/client';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { audit, limitOverride, lot } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { bindSlot } from '$lib/server/services/bindSlot';
import { changeDraftSettings } from '$lib/server/services/changeDraftSettings';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { decidedTexts } from '$lib/server/services/decidedTexts';
import { decideLimit, takeBackDecision } from '$lib/server/services/decideLimit';
import { ensureTemplates } from '$lib/server/services/ensureTemplates';
import { limitsScreen } from '$lib/server/services/limitsScreen';
import { openDraft } from '$lib/server/services/openDraft';
import { savePolicy } from '$lib/server/services/savePolicy';
import { testLimitsCsv } from '$lib/server/services/testLimitsCsv';
import { viewDraft } from '$lib/server/services/viewDraft';
import { ENGINEER, insertAcceptedSet, insertProduct } from '../factories/acceptedSet';
import { openTestDatabase } from '../factories/testDatabase';
import { unreachableStorage } from '../factories/unreachableStorage';

/* The tuning case of the limit engine: three lots of 25 devices at exact normal scores. */
const MEDIANS = [14.8, 15.0, 15.2];
const PER_LOT = 25;
const PART = 'LKT-1130';
const CONDITION = 'T=25;f=1000000;VR=4';
const RULES: LimitPolicy = {
	name: 'Tested tuning',
	method: 'normal',
	content: 0.99,
	confidence: 0.95,
	tails: 'each',
	span: 'each-bias',
	minimumLots: 3,
	minimumDevices: 30,
	drift: 0.005,
	uncertaintyTreatment: 'outwards',
	guardBand: 1,
	resolution: { step: 0.1 }
};

let opened: OpenDatabase;
let product: { id: number; basisHash: string };
let policyVersion = 0;

/** The case as a product of its own; with a mother lot, all devices come from one wafer lot. */
async function insertCase(partNumber: string, sha256: string, motherLot?: string) {
	const { db } = opened;
	const id = await insertProduct(db, partNumber);
	const ofLot = (of: (j: number) => number) => Array.from({ length: PER_LOT }, (_, j) => of(j));
	await insertAcceptedSet(db, {
		product: id,
		sha256,
		uncertainty: 0,
		devices: MEDIANS.flatMap((_, lot) =>
			ofLot((j) => j).map((j) => ({ lot: `LK26-0${lot + 11}`, wafer: '01', name: String(j + 1) }))
		),
		biases: [4],
		frequency: 1e6,
		picofarads: new Map([
			[
				25,
				Float64Array.from(
					MEDIANS.flatMap((median) =>
						ofLot((j) => median * Math.exp(0.015 * normalQuantile((j + 0.5) / PER_LOT)))
					)
				)
			]
		])
	});
	if (motherLot !== undefined) {
		await write(db, (tx) => tx.update(lot).set({ waferLot: motherLot }).where(eq(lot.product, id)));
	}
	await computeDistributions(
		{ db, storage: unreachableStorage },
		{ product: id },
		{ id: 1, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);
	const found = await findProductByPartNumber(db, partNumber);
	return { id, basisHash: found?.basisHash ?? '' };
}

beforeAll(async () => {
	opened = await openTestDatabase();
	product = await insertCase(PART, 'a'.repeat(64));
	const saved = await savePolicy(opened, { rules: RULES, by: ENGINEER });
	policyVersion = saved.status === 'saved' ? saved.id : 0;
});
afterAll(() => opened.close());

const decision = {
	minimum: '14.2',
	maximum: '15.8',
	testerUncertainty: 0.05,
	isOutsideIntended: false,
	reason: 'Agreed with the customer; each device is tested at 4 V.'
};
const at = () => ({
	partNumber: PART,
	conditionKey: CONDITION,
	policyVersion,
	basis: 'tested' as const,
	by: ENGINEER
});
async function printedRow(basis: 'tested' | 'characterized' = 'tested') {
	const screen = await limitsScreen(opened.db, {
		product: product.id,
		basisHash: product.basisHash,
		policyVersion,
		declaredBasis: basis,
		rules: RULES
	});
	const row = screen.groups[0]?.rows[0];
	if (row === undefined) throw new Error('the tuning case has a row');
	return { row, decided: screen.decided.get(CONDITION) };
}
const decide = (change: Partial<typeof decision>) =>
	decideLimit(opened, { ...at(), ...decision, ...change });

describe('a decision is refused', () => {
	it.each([
		[{ reason: ' ' }, draftMessages.reasonNeeded()],
		[{ minimum: '14,2' }, limitsScreenMessages.limitUnread('minimum')],
		[{ minimum: '15.2' }, limitsScreenMessages.outOfOrder('minimum', 'typical')]
	])('with %j', async (change, message) => {
		const outcome = await decide(change);
		expect(outcome.status === 'refused' && outcome.message).toContain(message);
	});

	it('when more devices lie outside than the basis allows, unless that is meant', async () => {
		// 14.8·exp(0.015·Φ⁻¹(0.02)) = 14.351 and 14.8·exp(0.015·Φ⁻¹(0.06)) = 14.459: one lies below 14.4.
		const narrow = { minimum: '14.4' };
		const message = limitsScreenMessages.tooManyOutside('minimum', '14.4\u00a0pF', {
			count: 1,
			allowed: 0,
			sampleSize: 75,
			basis: 'tested on every device'
		});
		expect(await decide(narrow)).toEqual({ status: 'refused', message });
		expect(await decide({ ...narrow, isOutsideIntended: true })).toEqual({ status: 'decided' });
	});

	it('at a condition nobody measured', async () => {
		const elsewhere = { ...at(), ...decision, conditionKey: 'T=25;f=1000000;VR=5' };
		expect(await decideLimit(opened, elsewhere)).toEqual({
			status: 'refused',
			message: limitsScreenMessages.nothingMeasuredHere()
		});
	});
});

describe('printed 14.2 and 15.8 pF, tested on every device', () => {
	it('is tested at 14.33 and 15.67 pF, which 74 of 75 devices pass', async () => {
		expect(await decide({})).toEqual({ status: 'decided' });
		const { row, decided } = await printedRow();
		expect([row.minimum?.text, row.maximum?.text]).toEqual(['14.2', '15.8']);
		// 14.2/0.995 + 0.05 = 14.3214 and 15.8/1.005 − 0.05 = 15.6714 pF, rounded inwards
		expect([row.minimum?.test?.text, row.maximum?.test?.text]).toEqual(['14.33', '15.67']);
		expect(row.testYield).toMatchObject({ passed: 74, of: 75 });
		expect(decided).toMatchObject({ by: 'Ida Sandvik', reason: decision.reason });
	});

	it('keeps what the machine said beside it', async () => {
		const { row, decided } = await printedRow();
		// The machine: raw 14.238 and 15.801 pF, drift outwards 14.167 and 15.880, rounded outwards.
		expect(decided?.decision.machine).toMatchObject({
			minimum: '14.1',
			typical: '15.0',
			maximum: '15.9'
		});
		const last = row.minimum?.derivation.at(-1);
		expect(last).toMatchObject({ name: 'Decided minimum', text: '14.2', unit: 'pF' });
		expect(last?.method).toContain('The machine prints 14.1');
		expect((row.minimum?.raw ?? 0) / 1e-12).toBeCloseTo(14.238, 3);
	});

	it('concerns its own basis alone', async () => {
		const { row, decided } = await printedRow('characterized');
		expect(row.minimum?.text).toBe('14.1');
		expect(decided).toBeUndefined();
	});

	it('is what a draft binds, kept against the machine', async () => {
		const machine = {
			inputHash: 'h',
			unit: 'pF',
			unitScale: 1e-12,
			minimum: '14.1',
			typical: '15.0',
			maximum: '15.9',
			sampleSize: 75,
			independentLots: 3
		};
		const row = { characteristic: 'C_tot', conditionKey: CONDITION };
		const by = { row, policyVersion, machine };
		expect(await decidedTexts(opened.db, product.id, { ...by, basis: 'tested' })).toMatchObject({
			printed: { ...machine, minimum: '14.2', maximum: '15.8' },
			kept: { by: 'Ida Sandvik', reason: decision.reason, against: machine }
		});
		expect(await decidedTexts(opened.db, product.id, { ...by, basis: 'characterized' })).toEqual({
			printed: machine,
			kept: null
		});
	});

	it('is a line of the test programme, digits as printed', async () => {
		const search = new URLSearchParams({ policy: String(policyVersion), basis: 'tested' });
		const [head = '', line = '', ...rest] = (await testLimitsCsv(opened.db, product, search))
			.slice(1)
			.trim()
			.split('\r\n');
		const cells = line.split(',');
		const cell = (name: string) => cells[head.split(',').indexOf(name)];
		expect(rest).toEqual([]);
		expect(
			['reverse_voltage_volts', 'test_low', 'test_high', 'unit', 'printed_minimum'].map(cell)
		).toEqual(['4', '14.33', '15.67', 'pF', '14.2']);
		expect(
			[
				'guard_band_r',
				'guard_band_low',
				'tester_uncertainty',
				'yield_passed',
				'policy_version'
			].map(cell)
		).toEqual(['1', '0.05000', '0.05 pF', '74', '1']);
	});

	it('is taken back with a reason; both stay on record and in the audit trail', async () => {
		const back = { ...at(), reason: 'The customer takes the wider limit.' };
		expect(await takeBackDecision(opened, { ...back, reason: '' })).toMatchObject({
			status: 'refused'
		});
		expect(await takeBackDecision(opened, back)).toEqual({ status: 'takenBack' });
		const { row, decided } = await printedRow();
		expect(row.minimum?.text).toBe('14.1');
		expect(decided).toBeUndefined();
		expect(await takeBackDecision(opened, back)).toEqual({
			status: 'refused',
			message: limitsScreenMessages.nothingToTakeBack()
		});
		const kept = await opened.db
			.select()
			.from(limitOverride)
			.where(eq(limitOverride.product, product.id));
		expect(kept.map((of) => of.decision === null)).toEqual([false, false, true]);
		const said = await opened.db.select().from(audit).where(eq(audit.action, 'limit.decide'));
		expect(said.map(({ subject }) => subject)).toEqual(
			Array.from({ length: 2 }, () => `${PART} C_tot at ${CONDITION}`)
		);
	});
});

describe('declared tested, all devices of one mother wafer lot', () => {
	it('is refused for production, and fine for a preliminary sheet', async () => {
		const { db } = opened;
		const me = { partNumber: 'LKT-1131', by: ENGINEER };
		await insertCase(me.partNumber, 'b'.repeat(64), 'LK26-M1');
		// The machine asks for three lots and prints nothing; the decision prints 14.2 and 15.8.
		expect(await decideLimit(opened, { ...at(), ...decision, ...me })).toEqual({
			status: 'decided'
		});
		await ensureTemplates({ db });
		const terms = { policyVersion, status: 'production' as const };
		await openDraft(opened, { ...me, ...terms, template: 'tuning' });
		const place = 'capacitance.25c.VR=4';
		const bound = await bindSlot(opened, {
			...me,
			place,
			basis: 'tested',
			basisReason: 'Final test at 4 V.'
		});
		expect(bound).toMatchObject({ prints: { minimum: '14.2', maximum: '15.8' } });

		const problemsAt = async () => {
			const view = await viewDraft(db, me.partNumber);
			if (view.status !== 'open') throw new Error('the draft is open');
			const { slots, problems } = view.resolved;
			expect(slots.find(({ id }) => id === place)?.state).toBe('overridden');
			return problems.filter((of) => of.place === place).map(({ message }) => message);
		};
		expect(await problemsAt()).toEqual([draftMessages.tooFewLots(3, 1, RULES.name)]);
		await changeDraftSettings(opened, { ...me, ...terms, status: 'preliminary' });
		expect(await problemsAt()).toEqual([]);
	});
});

describe('a policy', () => {
	const save = (change: Partial<LimitPolicy>, policy?: string, seen?: number) =>
		savePolicy(opened, { rules: { ...RULES, ...change }, policy, seen, by: ENGINEER });

	it('gets a next version, and what used the first keeps it', async () => {
		expect(await save({ content: 0.95 }, 'tested-tuning', 1)).toMatchObject({
			status: 'saved',
			number: 2
		});
		expect((await printedRow()).row.policyVersion).toBe(policyVersion);
	});

	it('is refused where it says the same, moved meanwhile, or its name is taken', async () => {
		expect(await save({ content: 0.95 }, 'tested-tuning', 2)).toMatchObject({
			message: limitsScreenMessages.policyUnchanged(RULES.name)
		});
		expect(await save({}, 'tested-tuning', 1)).toMatchObject({
			message: limitsScreenMessages.policyMovedMeanwhile(2),
			newest: 2
		});
		expect(await save({})).toMatchObject({
			field: 'name',
			message: limitsScreenMessages.policyNameTaken(RULES.name)
		});
		expect(await save({ name: 'Other' }, 'nothing-like-it', 1)).toMatchObject({
			message: limitsScreenMessages.policyNotFound()
		});
		expect(await save({ name: '…' })).toMatchObject({
			message: limitsScreenMessages.policyNameWithoutLetters()
		});
	});
});
