import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { mayNot } from '$lib/core/messages';
import { limitMessages } from '$lib/core/messages/limits';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { insertAcceptedSet, insertProduct } from '../../factories/acceptedSet';
import { BIASES, columnOf, devices, FREQUENCY, sweeps } from '../../factories/threeLots';
import { unreachableStorage } from '../../factories/unreachableStorage';
import { serveApplication, type ServedApplication } from '../servedApplication';

/** SciPy 1.10.1: nct.ppf(0.95, 8, norm.ppf(0.99)*3)/3 */
const FACTOR_OF_NINE = 4.143022454476868;

const at25 = sweeps(7);
let served: ServedApplication;

beforeAll(async () => {
	served = await serveApplication();
	const product = await insertProduct(served.db);
	await insertProduct(served.db, 'LKT-0000');
	await insertAcceptedSet(served.db, {
		product,
		sha256: 'a'.repeat(64),
		uncertainty: 0.003,
		devices,
		biases: BIASES,
		frequency: FREQUENCY,
		picofarads: new Map([[25, at25]])
	});
	await computeDistributions(
		{ db: served.db, storage: unreachableStorage },
		{ product },
		{
			id: 1,
			attempt: 1,
			report: () => undefined,
			isCurrent: () => Promise.resolve(true)
		}
	);
}, 60_000);
afterAll(() => served.stop(), 30_000);

const API = '/api/v1/products/LKT-1130/capacitance-table';
const ask = (path: string, role: 'product_engineer' | 'reader' = 'product_engineer') =>
	fetch(served.url + path, {
		headers: { authorization: `Bearer ${served.people[role].token}` }
	});
async function page(path: string): Promise<string> {
	const cookie = await served.cookieOf(served.people.product_engineer);
	const response = await fetch(served.url + path, { headers: { cookie } });
	expect(response.status).toBe(200);
	return response.text();
}
const plain = (html: string) =>
	html
		.replace(/<script[\s\S]*?<\/script>/g, '')
		.replace(/<!--[\s\S]*?-->/g, '')
		.replace(/<[^>]+>/g, '')
		.replace(/\s+/g, ' ');

describe('the table over the API', () => {
	it('says minimum, typical and maximum in the unit it names', async () => {
		const response = await ask(`${API}?temperatureCelsius=25&biases=0,4,40`);
		expect(response.status).toBe(200);
		const table = (await response.json()) as {
			unit: string;
			rows: { bias: number; minimum: number; typical: number; maximum: number; basis: string }[];
		};
		expect(table).toMatchObject({
			unit: 'pF',
			temperatureCelsius: 25,
			frequencyHertz: FREQUENCY,
			policy: { name: 'Future lots 99/95', number: 1 }
		});
		const sorted = columnOf(at25, 4).toSorted((a, b) => a - b);
		const median = ((sorted[149] ?? 0) + (sorted[150] ?? 0)) / 2;
		expect(table.rows[1]?.typical).toBe(Number(median.toPrecision(3)));
		expect(table.rows[1]).toMatchObject({ bias: 4, basis: 'characterized', sampleSize: 300 });
		expect(table.rows[1]?.minimum).toBeLessThan(table.rows[1]?.typical ?? 0);
		expect(table.rows[1]?.maximum).toBeGreaterThan(table.rows[1]?.typical ?? 0);
		expect(table.rows[2]).toMatchObject({
			bias: 40,
			minimum: null,
			typical: null,
			maximum: null,
			refusals: [limitMessages.biasNotMeasured(40, BIASES)]
		});
	});

	it.each([
		['?biases=4', 'temperatureCelsius', limitMessages.expectsTemperature(undefined)],
		['?temperatureCelsius=25&biases=4,x', 'biases', limitMessages.expectsBiases('4,x')],
		['?temperatureCelsius=25&policy=999', 'policy', limitMessages.noSuchPolicy(999)],
		[
			'?temperatureCelsius=125',
			'temperatureCelsius',
			limitMessages.temperatureNotMeasured(125, [25])
		],
		[
			'?temperatureCelsius=25&frequency=1000',
			'frequency',
			limitMessages.frequencyNotMeasured(1000, [FREQUENCY])
		]
	])('refuses %s by the name of its parameter', async (query, parameter, detail) => {
		const response = await ask(API + query);
		expect(response.status).toBe(400);
		expect(response.headers.get('content-type')).toBe('application/problem+json');
		expect(await response.json()).toMatchObject({ status: 400, parameter, detail });
	});

	it('has nothing to say of a product without data, or without existence', async () => {
		const empty = await ask('/api/v1/products/LKT-0000/capacitance-table?temperatureCelsius=25');
		expect(empty.status).toBe(409);
		expect(await empty.json()).toMatchObject({ detail: limitMessages.noDistributions() });
		const absent = await ask('/api/v1/products/LKX-9/capacitance-table?temperatureCelsius=25');
		expect(absent.status).toBe(404);
		expect(await absent.json()).toMatchObject({ detail: limitMessages.noSuchProduct('LKX-9') });
	});

	it('is not for readers', async () => {
		const response = await ask(`${API}?temperatureCelsius=25`, 'reader');
		expect(response.status).toBe(403);
		expect(await response.json()).toMatchObject({ detail: mayNot('limit.read') });
	});

	it('takes the policies it lists', async () => {
		const { policies } = (await (await ask('/api/v1/policies')).json()) as {
			policies: { id: number; policy: string; method: string }[];
		};
		expect(policies.map(({ policy, method }) => [policy, method])).toEqual([
			['future-lots-99-95', 'lots'],
			['population-99-95', 'normal'],
			['any-shape-99-95', 'order'],
			['house-four-sigma', 'sigma']
		]);
		const sigma = await ask(
			`${API}?temperatureCelsius=25&biases=4&policy=${policies[3]?.id}&basis=tested`
		);
		expect(await sigma.json()).toMatchObject({
			policy: { name: 'House four sigma' },
			rows: [{ basis: 'tested', refusals: [] }]
		});
	});
});

describe('the preview of limits', () => {
	const lots = [
		[14.7, 14.9, 15.0],
		[15.1, 15.3, 15.2],
		[14.5, 14.6, 14.8]
	];
	const policy = { method: 'normal', content: 0.99, confidence: 0.95, sides: 'maximum' };
	const preview = (body: unknown, role: 'product_engineer' | 'reader' = 'product_engineer') =>
		fetch(`${served.url}/api/v1/limits/preview`, {
			method: 'POST',
			headers: {
				authorization: `Bearer ${served.people[role].token}`,
				'content-type': 'application/json'
			},
			body: typeof body === 'string' ? body : JSON.stringify(body)
		});

	it('answers limits, factors and the way to them', async () => {
		const response = await preview({ groups: lots, transform: 'ln', policy });
		expect(response.status).toBe(200);
		const answer = (await response.json()) as Record<string, unknown>;
		expect((answer.factors as { maximum: number }).maximum).toBeCloseTo(FACTOR_OF_NINE, 6);
		expect(answer.minimum).toBeNull();
		expect((answer.derivation as unknown[]).length).toBeGreaterThan(8);
	});

	it('refuses with the devices that are needed', async () => {
		const response = await preview({
			groups: lots,
			policy: { ...policy, method: 'order', sides: 'minimum-and-maximum' }
		});
		expect(response.status).toBe(422);
		expect(await response.json()).toMatchObject({ status: 422, requiredSampleSize: 368 });
	});

	it('says what is no JSON, and where a value is none', async () => {
		const broken = await preview('{');
		expect(broken.status).toBe(400);
		expect(await broken.json()).toMatchObject({ detail: limitMessages.notJson() });
		const wrong = await preview({ values: [1, 'a'], policy });
		expect(wrong.status).toBe(422);
		expect(await wrong.json()).toMatchObject({ errors: [{ path: 'values[1]' }] });
	});

	it('is not for readers', async () => {
		expect((await preview({ groups: lots, policy }, 'reader')).status).toBe(403);
	});
});

describe('the pages, without JavaScript', () => {
	it('shows limits, and the derivation of a number by its address', async () => {
		const own = '/products/LKT-1130/limits';
		const html = await page(own);
		const link = /href="([^"]*row=[^"]*VR%3D4&amp;side=minimum)"/.exec(html)?.[1];
		expect(link).toBeDefined();
		const sheet = plain(await page((link ?? '').replaceAll('&amp;', '&')));
		expect(sheet).toContain('Derivation');
		expect(sheet).toContain('Factor for future lots');
		expect(sheet).toContain('Printed minimum');
		const table = (await (await ask(`${API}?temperatureCelsius=25&biases=4`)).json()) as {
			rows: { printed: { minimum: string } }[];
		};
		expect(sheet).toMatch(new RegExp(`Printed minimum ?${table.rows[0]?.printed.minimum} ?pF`));
	});

	it('shows the curve as a table, and carries no device in the page', async () => {
		const html = await page('/products/LKT-1130/cv');
		expect(plain(html)).toContain('Spread by lot at');
		expect(html).not.toContain('LK26-011 · 01');
		expect(html.length).toBeLessThan(200_000);
	});

	it('says what to do where nothing is measured', async () => {
		for (const part of ['limits', 'cv']) {
			const text = plain(await page(`/products/LKT-0000/${part}`));
			expect(text).toContain(limitMessages.nothingYetTitle());
			expect(text).toContain('Upload measurements');
		}
	});

	it('gives the tables as CSV with every printed digit', async () => {
		const cookie = await served.cookieOf(served.people.product_engineer);
		const own = `${served.url}/products/LKT-1130`;
		const csv = await (await fetch(`${own}/limits/table.csv`, { headers: { cookie } })).text();
		const [head, ...lines] = csv.trim().split('\r\n');
		expect(head?.replace('\ufeff', '').split(',').slice(0, 5)).toEqual([
			'characteristic',
			'temperature_celsius',
			'frequency_hertz',
			'reverse_voltage_volts',
			'minimum'
		]);
		expect(lines.map((line) => line.split(',')[3])).toEqual(BIASES.map(String));
		const curve = await fetch(`${own}/cv/table.csv?temperatureCelsius=25`, { headers: { cookie } });
		expect((await curve.text()).trim().split('\r\n')).toHaveLength(BIASES.length + 1);
	});

	it('gives at most 80 sweeps to draw', async () => {
		const cookie = await served.cookieOf(served.people.product_engineer);
		const response = await fetch(`${served.url}/products/LKT-1130/cv/sweeps.json`, {
			headers: { cookie }
		});
		const sample = (await response.json()) as { total: number; sweeps: unknown[] };
		expect(sample.total).toBe(300);
		expect(sample.sweeps.length).toBeLessThanOrEqual(80);
	});
});
