import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { cvMessages } from '$lib/core/messages/cv';
import { limitMessages } from '$lib/core/messages/limits';
import { computeDistributions } from '$lib/server/services/computeDistributions';
import { fitSweepsJob } from '$lib/server/services/fitSweepsJob';
import { insertProduct } from '../../factories/acceptedSet';
import { insertPowerSchottky, POWER_BIASES } from '../../factories/powerSchottky';
import { unreachableStorage } from '../../factories/unreachableStorage';
import { serveApplication, type ServedApplication } from '../servedApplication';

const PART = 'LKR-4006';
const own = `/products/${PART}`;
let served: ServedApplication;
let cookie = '';

const ask = (path: string) => fetch(`${served.url}${path}`, { headers: { cookie } });
/** The text of a page, tags taken out. */
const page = async (path: string) =>
	(await (await ask(path)).text())
		.replaceAll(/<[^>]*>/g, ' ')
		.replaceAll('&nbsp;', ' ')
		.replaceAll(/\s+/g, ' ');

beforeAll(async () => {
	served = await serveApplication();
	cookie = await served.cookieOf(served.people.product_engineer);
	const stores = { db: served.db, storage: unreachableStorage };
	const product = await insertPowerSchottky(served.db, PART);
	await insertProduct(served.db, 'LKR-0000');
	const context = {
		id: 1,
		attempt: 1,
		report: () => undefined,
		isCurrent: () => Promise.resolve(true)
	};
	await computeDistributions(stores, { product }, context);
	await fitSweepsJob(stores, { product }, context);
}, 60_000);
afterAll(() => served.stop(), 30_000);

describe('the C–V page of the power Schottky', () => {
	// The worked case: C = 5 pF + 500 pF (1 + V/1.25)^−½ to 400 V. SciPy 1.17.1, integrate.quad,
	// epsrel 1e-12: 23.14559108 nC and 3.368457485 µJ.
	it('shows the charge and energy at 400 V', async () => {
		const text = await page(`${own}/cv`);
		expect(text).toContain('23.15 nC');
		expect(text).toContain('3.37 µJ');
		expect(text).toContain(cvMessages.chargeFrom(400));
	});

	it('shows the law of the median device, what the die says, and every fit as ended', async () => {
		const text = await page(`${own}/cv`);
		expect(text).toMatch(/15 devices .*500\.0 .*1\.250 .*0\.5000 .*5\.000/);
		expect(text).toContain(cvMessages.allFitted());
		// 1/C² = (1 + V/1.25)/(500 pF)²: zero at −1.25 V; V_bi is kT/q = 25.7 mV more.
		expect(text).toMatch(/V_i|V i/);
		expect(text).toContain('1.250 V');
		expect(text).toContain('1.276 V');
	});

	it('says by how much lots, wafers and devices spread', async () => {
		expect(await page(`${own}/cv`)).toMatch(
			/between lots .*between wafers of a lot .*between devices/
		);
	});

	it('sends less than 200 kB, its data included', async () => {
		const sizes = await Promise.all(
			['cv', 'cv/sweeps.json', 'cv/band.json'].map(async (path) => {
				const response = await ask(`${own}/${path}`);
				expect(response.status).toBe(200);
				return (await response.arrayBuffer()).byteLength;
			})
		);
		expect(sizes.reduce((sum, size) => sum + size, 0)).toBeLessThan(200_000);
	});

	it('fills the band between the measured biases, the measured ones unchanged', async () => {
		const { points } = (await (await ask(`${own}/cv/band.json`)).json()) as {
			points: { bias: number; typical: number }[];
		};
		expect(points.length).toBeGreaterThanOrEqual(POWER_BIASES.length + 30);
		const at400 = points.find(({ bias }) => bias === 400);
		// 5 + 500/√321 pF by hand.
		expect(at400?.typical).toBeCloseTo(5 + 500 / Math.sqrt(321), 3);
	});
});

describe('the SPICE model of the median device', () => {
	it('has the law, the part number and where it comes from', async () => {
		const response = await ask(`${own}/cv/model.lib?temperatureCelsius=25`);
		expect(response.headers.get('content-disposition')).toContain('LKR-4006-25C.lib');
		const text = await response.text();
		expect(text).toContain('* LKR-4006, typical device');
		expect(text).toContain('15 devices of 3 lots at 25 degC, 1000000 Hz');
		const number = (name: string) => Number(new RegExp(`\\b${name}=(\\S+)`).exec(text)?.[1]);
		expect(number('cjo')).toBeCloseTo(500e-12, 15);
		expect(number('vj')).toBeCloseTo(1.25, 5);
		expect(number('m')).toBeCloseTo(0.5, 6);
		expect(Number(/^ccase a k (\S+)/m.exec(text)?.[1])).toBeCloseTo(5e-12, 16);
		expect(text).toMatch(/^[\x20-\x7e\n]*$/);
	});

	it('is refused where nothing is measured, and for a product that is none', async () => {
		const empty = await ask('/products/LKR-0000/cv/model.lib');
		expect(empty.status).toBe(409);
		expect(await empty.json()).toMatchObject({ detail: limitMessages.noDistributions() });
		expect((await ask('/products/LKR-9999/cv/model.lib')).status).toBe(404);
	});
});

describe('the coverage of data', () => {
	it('counts the devices of each lot and says what a policy lacks', async () => {
		const text = await page(`${own}/coverage`);
		expect(text).toMatch(/LK26-101 LK26-102 LK26-103/);
		expect(text).toContain('Every lot was measured at every condition.');
		// House policies ask for thirty devices; there are fifteen.
		expect(text).toContain(cvMessages.moreDevices(15));
	});

	it('says what to do where nothing is measured', async () => {
		for (const path of ['/products/LKR-0000/coverage', '/products/LKR-0000/cv'])
			expect(await page(path)).toContain(limitMessages.nothingYetTitle());
	});
});
