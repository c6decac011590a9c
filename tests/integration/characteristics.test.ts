import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { forwardVoltage } from '$lib/core/junction/forwardCurrent';
import type { LimitPolicy } from '$lib/core/limits/policy';
import { packMatrix } from '$lib/core/measurements/blocks';
import { limitMessages } from '$lib/core/messages/limits';
import type { OpenDatabase } from '$lib/server/db/client';
import { policyVersion, sweepBlock } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { bindEverything } from '$lib/server/services/bindEverything';
import {
	characteristicLimits,
	type CharacteristicLimitsRequest
} from '$lib/server/services/characteristicLimits';
import { characteristicsScreen } from '$lib/server/services/characteristicsScreen';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { ensureOrganization } from '$lib/server/services/ensureOrganization';
import { ensureTemplates } from '$lib/server/services/ensureTemplates';
import { EvidenceSource } from '$lib/server/services/evidenceSource';
import { openDraft } from '$lib/server/services/openDraft';
import { sha256 } from '$lib/server/services/sha256';
import { viewDraft } from '$lib/server/services/viewDraft';
import { ENGINEER, insertAcceptedSet, insertProduct } from '../factories/acceptedSet';
import { insertReadings } from '../factories/insertReadings';
import { openTestDatabase } from '../factories/testDatabase';
import { unreachableStorage } from '../factories/unreachableStorage';

/*
 * 75 devices of three lots whose logarithms have exactly the moments of the worked case: ln C(1 V)
 * around ln 15 pF with 2 %, ln C(28 V) around ln 2 pF with 2.5 %, correlation 0.8. Cosine and sine
 * of evenly spread angles have mean 0, equal squares and no correlation.
 */
const COUNT = 75;
const devices = Array.from({ length: COUNT }, (_, i) => ({
	lot: `LK26-0${1 + (i % 3)}`,
	wafer: '1',
	name: String(i + 1)
}));
const unit = Math.sqrt((2 * (COUNT - 1)) / COUNT);
const scores = devices.map((_, i) => {
	const angle = (2 * Math.PI * i) / COUNT;
	return [unit * Math.cos(angle), unit * Math.sin(angle)] as const;
});
const at1V = scores.map(([u]) => 15 * Math.exp(0.02 * u));
const at28V = scores.map(([u, v]) => 2 * Math.exp(0.025 * (0.8 * u + 0.6 * v)));
const at4V = scores.map(([u]) => 9 * Math.exp(0.02 * u));
const WARMING = 3e-4;

/** Leakage in nA: four at the floor of 0.1 nA, the others from 0.15 nA to 3.7 nA. */
const leakage = devices.map((_, i) => (i < 4 ? 0.1 : 0.05 * i));
const atFloor = leakage.map((_, i) => (i < 4 ? -1 : 0));

/** Known parameters at content 0.99 a side: mean ± z_0.99·s. R: qnorm(0.99). */
const KNOWN: LimitPolicy = {
	name: 'Known parameters 99',
	method: 'sigma',
	content: 0.99,
	confidence: 0.95,
	tails: 'each',
	span: 'each-bias',
	k: 2.3263478740408408,
	minimumLots: 1,
	minimumDevices: 30,
	drift: 0,
	uncertaintyTreatment: 'outwards',
	resolution: { significantFigures: 3 }
};
const POOLED: LimitPolicy = { ...KNOWN, name: 'Population 99/95', method: 'normal' };

/** Bias in V and current in A with the sign of the bias: a diode law forward, 2 nA in reverse. */
const LAW = { ideality: 1.1, saturationCurrent: 1e-12, seriesResistance: 0.7 };
const FAMILY: readonly (readonly [number, number])[] = [
	...Array.from({ length: 30 }, (_, i): readonly [number, number] => {
		const current = 1e-8 * 10 ** (i / 4.5);
		return [-forwardVoltage(LAW, current, 298.15), -current];
	}),
	[10, 1e-9],
	[28, 2e-9]
];

let opened: OpenDatabase;
let product = 0;
const policies = { known: 0, pooled: 0 };

async function addPolicy(json: LimitPolicy): Promise<number> {
	const hash = sha256(JSON.stringify(json));
	const [added] = await write(opened.db, (tx) =>
		tx
			.insert(policyVersion)
			.values({
				policy: hash.slice(0, 12),
				number: 1,
				json,
				hash,
				createdAt: '2026-01-05T08:00:00.000Z',
				createdBy: null
			})
			.returning()
	);
	return added?.id ?? 0;
}

async function limitsOf(characteristic: string, more: Partial<CharacteristicLimitsRequest> = {}) {
	const found = await characteristicLimits(opened.db, {
		product,
		characteristic,
		policyVersion: policies.pooled,
		...more
	});
	if ('status' in found) throw new Error(found.message);
	return found;
}

beforeAll(async () => {
	opened = await openTestDatabase();
	const { db } = opened;
	await ensureOrganization({ db }, { by: null });
	await ensureTemplates({ db });
	policies.pooled = await addPolicy(POOLED);
	policies.known = await addPolicy(KNOWN);
	product = await insertProduct(db);
	const sweeps = (factor: number) =>
		Float64Array.from(
			devices.flatMap((_, i) => [at1V[i], at4V[i], at28V[i]].map((of) => factor * (of ?? 0)))
		);
	const set = await insertAcceptedSet(db, {
		product,
		sha256: 'a'.repeat(64),
		uncertainty: null,
		devices,
		biases: [1, 4, 28],
		frequency: 1e6,
		picofarads: new Map([
			[25, sweeps(1)],
			[85, sweeps(Math.exp(60 * WARMING))]
		])
	});
	await insertReadings(db, set, {
		characteristic: 'I_R',
		condition: { temperatureCelsius: 25, reverseVoltage: 28 },
		unitScale: 1e-9,
		values: leakage,
		censored: atFloor
	});
	for (const [temperatureCelsius, values] of [
		[85, devices.map(() => 20)],
		[125, devices.map(() => 0.1)]
	] as const) {
		await insertReadings(db, set, {
			characteristic: 'I_R',
			condition: { temperatureCelsius, reverseVoltage: 28 },
			unitScale: 1e-9,
			values,
			censored: devices.map(() => (temperatureCelsius === 125 ? -1 : 0))
		});
	}
	await write(db, (tx) =>
		tx.insert(sweepBlock).values({
			set,
			quantity: 'current',
			conditionKey: 'T=25',
			chunk: 0,
			gridHash: 'currents',
			grid: FAMILY.map(([bias]) => bias),
			unitScale: 1,
			values: Buffer.from(
				packMatrix(Float64Array.from(devices.flatMap(() => FAMILY.map(([, current]) => current))))
			)
		})
	);
	await insertReadings(db, set, {
		characteristic: 'r_s',
		condition: { temperatureCelsius: 25, frequency: 470e6, reverseVoltage: 4 },
		unitScale: 1,
		values: devices.map(() => 0.5)
	});
	await insertReadings(db, set, {
		characteristic: 'V_F',
		condition: { temperatureCelsius: 25, forwardCurrent: 0.01, pulseDuration: 3e-4 },
		unitScale: 1,
		values: devices.map((_, i) => 0.8 + 0.0001 * i)
	});
	await computeDistributions(
		{ db, storage: unreachableStorage },
		{ product },
		{ id: 1, attempt: 1, report: () => undefined, isCurrent: () => Promise.resolve(true) }
	);
});
afterAll(() => opened.close());

describe('the ratio C(1 V)/C(28 V)', () => {
	const tested = { policyVersion: 0, declaredBasis: 'tested' } as const;
	const room = {
		temperatureCelsius: 25,
		frequency: 1e6,
		reverseVoltage: 1,
		secondReverseVoltage: 28
	};

	// 7.5·exp(∓2.3263·0.015), where 0.015 = √(0.02² + 0.025² − 2·0.8·0.02·0.025): by hand.
	it('is limited from each device’s own ratio, 7.24 to 7.77', async () => {
		const { rows, unit: shown } = await limitsOf('C_ratio', {
			...tested,
			policyVersion: policies.known,
			conditions: [room]
		});
		expect(shown).toBe('');
		expect([rows[0]?.minimum?.text, rows[0]?.typical?.text, rows[0]?.maximum?.text]).toEqual([
			'7.24',
			'7.50',
			'7.77'
		]);
		expect(rows[0]?.minimum?.raw).toBeCloseTo(7.5 * Math.exp(-2.3263478740408408 * 0.015), 9);
	});

	it('is read a second time from the packed sweeps, with the same spread', async () => {
		const source = new EvidenceSource(opened.db, product);
		const { devices: found } = await source.ratiosAt(
			{ temperatureCelsius: 25, frequency: 1e6 },
			[1, 28]
		);
		const logs = found.map(({ value }) => Math.log(value / 7.5));
		expect(found).toHaveLength(COUNT);
		expect(logs.reduce((sum, one) => sum + one ** 2, 0) / (COUNT - 1)).toBeCloseTo(0.015 ** 2, 12);
	});

	it('says where it is stored when another one is asked for', async () => {
		const { rows } = await limitsOf('C_ratio', {
			conditions: [{ ...room, secondReverseVoltage: 20 }]
		});
		expect(rows[0]?.minimum).toBeNull();
		expect(rows[0]?.refusals[0]).toContain('C_ratio is not stored at');
		expect(rows[0]?.refusals[0]).toContain('second V_R = 28');
	});
});

describe('leakage with four zeros among 75', () => {
	it('counts them as at most 0.1 nA, and says so', async () => {
		const { rows, distributions } = await limitsOf('I_R', {
			unit: { unit: 'nA', unitScale: 1e-9 }
		});
		expect(distributions[0]?.distribution).toMatchObject({
			sampleSize: 75,
			censoring: { atOrBelow: 4, floor: 1e-10, atOrAbove: 0, ceiling: null }
		});
		const [row] = rows;
		expect(row?.sampleSize).toBe(75);
		expect(row?.warnings).toContain(limitMessages.censored(4, 75));
		expect(row?.minimum).toBeNull();
		expect(row?.refusals).toEqual([]);
		expect(row?.unit).toBe('nA');
		expect(row?.typical?.text).toBe('1.85');
		expect(Number(row?.maximum?.text)).toBeGreaterThan(3.7);
	});
});

describe('what is derived from several measurements', () => {
	it('has a quality factor at each series resistance read in reverse', async () => {
		const { rows, distributions } = await limitsOf('Q');
		expect(rows.map(({ conditionKey, typical }) => [conditionKey, typical?.text])).toEqual([
			['T=25;f=470000000;VR=4', '75.3']
		]);
		// 1/(2π·470e6·9e-12·0.5) = 75.25 at the geometric mean of the capacitances: by hand.
		expect(Math.exp(distributions[0]?.distribution.mean ?? 0)).toBeCloseTo(75.25, 2);
		expect(rows[0]?.maximum).toBeNull();
	});

	it('has a temperature coefficient where two temperatures were measured', async () => {
		const { rows, distributions } = await limitsOf('α_C');
		expect(rows.map(({ conditionKey, unit: shown }) => [conditionKey, shown])).toEqual([
			['T=25;f=1000000;VR=4', '10⁻⁶/K']
		]);
		expect(distributions[0]?.distribution.mean).toBeCloseTo(WARMING, 12);
	});

	it('has no charge where nobody measured at 0 V', async () => {
		await expect(limitsOf('Q_C')).rejects.toThrow('No distribution of Q_C is stored');
	});
});

describe('the screen', () => {
	const screen = async () => {
		const found = await findProductByPartNumber(opened.db, 'LKT-1130');
		return characteristicsScreen(opened.db, {
			product,
			basisHash: found?.basisHash ?? '',
			policyVersion: policies.pooled,
			declaredBasis: 'characterized'
		});
	};

	it('has every reading and derived characteristic, and no device', async () => {
		const { groups } = await screen();
		expect(groups.map(({ characteristic }) => characteristic.key)).toEqual([
			'V_F',
			'I_R',
			'r_s',
			'C_ratio',
			'Q',
			'α_C'
		]);
	});

	it('draws the median currents and extracts the law they were made by', async () => {
		const [family, ...others] = (await screen()).families;
		expect(others).toEqual([]);
		expect(family).toMatchObject({ temperatureCelsius: 25, devices: COUNT });
		expect(family?.reverse).toEqual([
			[10, 1e-9],
			[28, 2e-9]
		]);
		if (family?.extracted.status !== 'fitted') throw new Error('not fitted');
		const { model } = family.extracted.fit;
		expect(model.ideality).toBeCloseTo(1.1, 6);
		expect(model.saturationCurrent / 1e-12).toBeCloseTo(1, 5);
		expect(model.seriesResistance).toBeCloseTo(0.7, 6);
	});

	it('has an activation energy from two medians, without one that rests on censored readings', async () => {
		const [leakage] = (await screen()).leakage;
		expect(leakage?.leftOut).toEqual([125]);
		// k·ln(20/1.85)/(1/298.15 − 1/358.15), k = 8.617333262e-5 eV/K: by hand.
		const [k, cold, hot] = [8.617333262e-5, 1 / 298.15, 1 / 358.15];
		expect(leakage?.energy).toBeCloseTo((k * Math.log(20 / 1.85)) / (cold - hot), 9);
	});
});

describe('binding everything that matches', () => {
	it('binds readings and derived characteristics beside capacitances', async () => {
		const { db } = opened;
		const draft = { partNumber: 'LKT-1130', by: ENGINEER };
		await openDraft(
			{ db },
			{ ...draft, template: 'tuning', policyVersion: policies.pooled, status: 'production' }
		);
		const outcome = await bindEverything({ db }, draft);
		if (outcome.status !== 'bound') throw new Error(outcome.message);
		expect(outcome.bound).toEqual(
			expect.arrayContaining([
				expect.stringMatching(/^I_R at/),
				expect.stringMatching(/^C_ratio at/)
			])
		);
		expect(outcome.left.find(({ label }) => label.startsWith('V_(BR)'))?.why).toContain(
			'No stored measurement gives V_(BR)'
		);
		const view = await viewDraft(db, 'LKT-1130');
		if (view.status !== 'open') throw new Error(view.status);
		const printed = (slot: string) => {
			const found = view.resolved.slots.find(({ id }) => id === slot);
			return [found?.state, found?.prints?.unit, found?.prints?.typical];
		};
		expect(printed('characteristics.reverse-current')).toEqual(['bound', 'nA', '1.85']);
		expect(printed('characteristics.capacitance-ratio')).toEqual(['bound', '', '7.50']);
	});
});
