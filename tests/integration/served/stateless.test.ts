import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { junctionMessages } from '$lib/core/messages/junction';
import { screenedMessages } from '$lib/core/messages/screened';
import { ORIGIN, serveApplication, type ServedApplication } from '../servedApplication';

let served: ServedApplication;
beforeAll(async () => {
	served = await serveApplication();
}, 60_000);
afterAll(() => served.stop(), 30_000);

const API = { fit: '/api/v1/junction/fit', screened: '/api/v1/limits/screened' } as const;

function post(path: string, body: unknown, headers: Readonly<Record<string, string>>) {
	return fetch(served.url + path, {
		method: 'POST',
		headers: { 'content-type': 'application/json', ...headers },
		body: typeof body === 'string' ? body : JSON.stringify(body)
	});
}
const asEngineer = (path: string, body: unknown) =>
	post(path, body, { authorization: `Bearer ${served.people.product_engineer.token}` });

const BIASES = Array.from({ length: 33 }, (_, i) => i * 12.5);
/** The power Schottky of the worked case. */
const SWEEP = {
	biases: BIASES,
	capacitances: BIASES.map((bias) => 5e-12 + 500e-12 / Math.sqrt(1 + bias / 1.25))
};

describe('the fit of one sweep', () => {
	// SciPy 1.17.1: integrate.quad of the law and of v times it, 0 to 400 V
	it('answers model, line, profile, charge and a model file', async () => {
		const response = await asEngineer(API.fit, {
			...SWEEP,
			area: 1e-6,
			relativePermittivity: 9.66,
			temperature: 300,
			junction: 'metal-semiconductor',
			effectiveDensityOfStates: 1.7e25
		});
		expect(response.status).toBe(200);
		const answer = (await response.json()) as {
			model: Record<string, unknown>;
			line: { donorConcentration: number; builtInPotential: number; barrierHeight: number };
			profile: unknown[];
			charge: { bias: number; charge: number; energy: number }[];
			spice: string;
			warnings: string[];
		};
		expect(answer.model).toMatchObject({ converged: true, identifiable: true, boundsHit: [] });
		expect(answer.model.gradingExponent).toBeCloseTo(0.5, 6);
		expect(answer.charge.at(-1)!.charge * 1e9).toBeCloseTo(23.14559, 4);
		expect(answer.charge.at(-1)!.energy * 1e6).toBeCloseTo(3.368457, 5);
		expect(answer.line.builtInPotential).toBeCloseTo(1.25 + 0.0258519998, 5);
		expect(answer.line.barrierHeight).toBeGreaterThan(answer.line.builtInPotential);
		expect(answer.profile).toHaveLength(32);
		expect(answer.spice).toContain('.subckt');
		expect(answer.warnings).toEqual([]);
	});

	it('refuses with the place', async () => {
		const response = await asEngineer(API.fit, {
			...SWEEP,
			capacitances: SWEEP.capacitances.with(3, 0)
		});
		expect(response.status).toBe(422);
		expect(response.headers.get('content-type')).toBe('application/problem+json');
		const message = junctionMessages.notPositive(0);
		expect(await response.json()).toMatchObject({
			detail: `capacitances[3]: ${message}`,
			errors: [{ path: 'capacitances[3]', message }]
		});
		const empty = await asEngineer(API.fit, {});
		expect(empty.status).toBe(422);
		const { errors } = (await empty.json()) as { errors: { path: string }[] };
		expect(errors.map(({ path }) => path)).toEqual(['biases', 'capacitances']);
	});
});

describe('limits behind a test', () => {
	const [tested, limited] = [1, 2].map((column) =>
		readFileSync('tests/oracle/data/screen_pairs_synthetic.csv', 'utf8')
			.trim()
			.split('\n')
			.slice(1)
			.map((line) => Number(line.split(',')[column]))
	);
	const asked = { tested, limited, content: 0.99, confidence: 0.95, sides: 'maximum' };

	// Reference M-syn-max-p0.99-c0.95
	it('answers limits, factors, conditions and the way to them', async () => {
		const response = await asEngineer(API.screened, {
			...asked,
			window: { low: 16.8, high: 19.2 }
		});
		expect(response.status).toBe(200);
		const answer = (await response.json()) as Record<string, unknown>;
		expect(answer.maximum).toBeCloseTo(7.9982872, 6);
		expect(answer).toMatchObject({ minimum: null, method: 'edge-rule', verdict: 'not-checked' });
		expect(answer.conditions).toHaveLength(7);
		expect((answer.derivation as unknown[]).length).toBeGreaterThan(10);
	});

	it('refuses with what is missing', async () => {
		const response = await asEngineer(API.screened, asked);
		expect(response.status).toBe(422);
		const detail = `window: ${screenedMessages.windowMissing()}`;
		expect(await response.json()).toMatchObject({ status: 422, detail });
	});
});

describe.each(Object.values(API))('%s', (path) => {
	it('is not for readers, nor without a sign-in', async () => {
		const { reader } = served.people;
		expect((await post(path, {}, { authorization: `Bearer ${reader.token}` })).status).toBe(403);
		expect((await post(path, {}, { origin: ORIGIN })).status).toBe(401);
	});

	it('takes a session of the same origin, and none of another', async () => {
		const cookie = await served.cookieOf(served.people.product_engineer);
		expect((await post(path, {}, { cookie, origin: ORIGIN })).status).toBe(422);
		expect((await post(path, {}, { cookie, origin: 'http://elsewhere.test' })).status).toBe(403);
	});

	it('wants JSON', async () => {
		expect((await asEngineer(path, '{')).status).toBe(400);
	});
});
