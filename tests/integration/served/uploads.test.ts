import { request as send } from 'node:http';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { bodyLengthNeeded, bodyTooLarge } from '$lib/core/messages';
import { measurementMessages } from '$lib/core/messages/measurements';
import { demoFiles } from '../../../src/tasks/generator/demoFiles';
import { insertProduct } from '../../factories/acceptedSet';
import { ORIGIN, serveApplication } from '../servedApplication';
import type { ServedApplication } from '../servedApplication';

const SETS = '/api/v1/products/LKT-1130/measurement-sets';
let served: ServedApplication;

beforeAll(async () => {
	served = await serveApplication({ BODY_SIZE_LIMIT: 'Infinity', UPLOAD_LIMIT_MB: '2' });
	await insertProduct(served.db);
}, 60_000);
afterAll(() => served.stop(), 60_000);

const bearer = () => ({ authorization: `Bearer ${served.people.product_engineer.token}` });
const ask = (path: string, init: RequestInit = {}) =>
	fetch(served.url + path, {
		redirect: 'manual',
		...init,
		headers: { ...bearer(), ...init.headers }
	});
const post = (path: string, body: BodyInit) => ask(path, { method: 'POST', body });
const read = async (response: Response) => (await response.json()) as Record<string, unknown>;

interface Reference {
	readonly id: number;
	readonly url: string;
}

/** Waits for the worker to end a job. */
async function ended(job: unknown) {
	const { url } = job as Reference;
	return vi.waitFor(
		async () => {
			const now = await read(await ask(url));
			expect(['done', 'failed']).toContain(now.state);
			return now;
		},
		{ timeout: 60_000, interval: 100 }
	);
}

/** Sends a body without saying how long it is, as a stream goes. */
function postInPieces(path: string, pieces: readonly string[]) {
	return new Promise<{ status: number; body: string }>((resolve, reject) => {
		const headers = { ...bearer(), 'content-type': 'text/csv' };
		const sending = send(served.url + path, { method: 'POST', headers }, (response) => {
			let body = '';
			response.on('data', (part: Buffer) => (body += part.toString()));
			response.on('end', () => resolve({ status: response.statusCode ?? 0, body }));
		});
		sending.on('error', reject);
		for (const piece of pieces) sending.write(piece);
		sending.end();
	});
}

const SMALL = 'lot,device,T [C],f [MHz],V_R [V],C\nA,D1,25,1,0,38.5\nA,D1,25,1,4,13.75\n';

describe('an upload', () => {
	it('goes by the API from raw bytes to an accepted set, and comes back as CSV', async () => {
		const [file] = demoFiles();
		const text = `${[...(file?.lines() ?? [])].join('\n')}\n`;
		const received = await post(`${SETS}?filename=${file?.fileName}`, text);
		expect(received.status).toBe(202);
		const { upload, job } = (await read(received)) as { upload: Reference; job: Reference };
		expect(received.headers.get('location')).toBe(upload.url);
		expect((await ended(job)).state).toBe('done');

		const mapped = await post(`${upload.url}/mapping`, '{}');
		expect(mapped.status).toBe(202);
		expect((await ended((await read(mapped)).job)).state).toBe('done');

		const accepted = await read(await ask(upload.url));
		expect(accepted).toMatchObject({ state: 'accepted', fileName: file?.fileName });
		const { measurementSets } = (await read(await ask(SETS))) as {
			measurementSets: { id: number; counts: { points: number } }[];
		};
		expect(measurementSets).toHaveLength(1);
		expect(measurementSets[0]).toMatchObject({
			id: accepted.measurementSet,
			counts: { points: 9900 }
		});

		const cookie = await served.cookieOf(served.people.product_engineer);
		const csv = await fetch(
			`${served.url}/products/LKT-1130/measurements/sets/${measurementSets[0]?.id}/readings.csv`,
			{ headers: { cookie } }
		);
		expect(csv.headers.get('content-type')).toBe('text/csv; charset=utf-8');
		expect((await csv.text()).trimEnd().split('\n')).toHaveLength(9901);

		const again = await post(`${SETS}?filename=again.csv`, text);
		expect(again.status).toBe(409);
		expect(await read(again)).toMatchObject({ status: 409, upload: { id: upload.id } });
	}, 120_000);

	it('is refused without a unit, taken when it is said, and sent back with its lines', async () => {
		const received = await post(`${SETS}?filename=small.csv`, `${SMALL}A,D2,25,1,0,open\n`);
		const { upload, job } = (await read(received)) as { upload: Reference; job: Reference };
		await ended(job);

		const refused = await post(`${upload.url}/mapping`, '{}');
		expect(refused.status).toBe(422);
		expect(await read(refused)).toMatchObject({
			detail: measurementMessages.unitMissing('C'),
			messages: [measurementMessages.unitMissing('C')]
		});

		const columns = [
			{ header: 'lot', meaning: 'lot' },
			{ header: 'device', meaning: 'device' },
			{ header: 'T [C]', meaning: 'temperature', unit: '°C' },
			{ header: 'f [MHz]', meaning: 'frequency', unit: 'MHz' },
			{ header: 'V_R [V]', meaning: 'bias', unit: 'V' },
			{ header: 'C', meaning: 'capacitance', unit: 'pF' }
		];
		const mapped = await post(`${upload.url}/mapping`, JSON.stringify({ columns }));
		const end = await ended((await read(mapped)).job);
		expect(end).toMatchObject({ state: 'failed', error: measurementMessages.linesRefused(1) });
		expect(await read(await ask(upload.url))).toMatchObject({
			state: 'refused',
			problems: { total: 1, lines: [{ line: 4, read: 'A,D2,25,1,0,open' }] }
		});

		const skipped = await post(`${upload.url}/mapping`, JSON.stringify({ columns, skipLines: 1 }));
		expect((await ended((await read(skipped)).job)).state).toBe('done');
	}, 120_000);

	it('needs a name, a product, and a mapping that is one', async () => {
		expect((await post(SETS, SMALL)).status).toBe(400);
		const empty = await ask(`${SETS}?filename=a.csv`, { method: 'POST' });
		expect(await read(empty)).toMatchObject({ status: 400, detail: measurementMessages.noBody() });
		expect((await post('/api/v1/products/LKT-9/measurement-sets?filename=a', SMALL)).status).toBe(
			404
		);
		expect((await ask('/api/v1/uploads/99')).status).toBe(404);
		expect((await post('/api/v1/uploads/99/mapping', '{}')).status).toBe(404);
		const wrong = await post('/api/v1/uploads/1/mapping', '{"columns":[{"meaning":"colour"}]}');
		expect(wrong.status).toBe(400);
		expect(await read(wrong)).toMatchObject({ errors: [{ path: 'columns.0.header' }, {}] });
	});

	it('comes by a form too, where no script runs', async () => {
		const cookie = await served.cookieOf(served.people.product_engineer);
		const body = new FormData();
		body.set('file', new File([SMALL.replace('38.5', '38.25')], 'by-form.csv'));
		const answer = await fetch(`${served.url}/products/LKT-1130/measurements?/upload`, {
			method: 'POST',
			redirect: 'manual',
			headers: { cookie, origin: ORIGIN, accept: 'text/html' },
			body
		});
		expect(answer.status).toBe(303);
		expect(answer.headers.get('location')).toMatch(/\/measurements\/uploads\/\d+$/);
	});
});

describe('limits', () => {
	it('take a stream of unknown length up to the limit of uploads and no further', async () => {
		const piece = `${'A,D1,25,1,0,38.5\n'.repeat(30_000)}`;
		const within = await postInPieces(`${SETS}?filename=stream.csv`, [SMALL, piece]);
		expect(within.status).toBe(202);
		const beyond = await postInPieces(
			`${SETS}?filename=long.csv`,
			Array(5).fill(piece) as string[]
		);
		expect(beyond.status).toBe(413);
		expect(JSON.parse(beyond.body)).toMatchObject({
			detail: measurementMessages.fileTooLarge(2e6)
		});
	});

	it('hold every other body small, and ask for its length', async () => {
		const large = await post('/api/v1/uploads/1/mapping', 'x'.repeat(1_000_001));
		expect(large.status).toBe(413);
		expect(await read(large)).toMatchObject({ detail: bodyTooLarge(1_000_000) });
		const unknown = await postInPieces('/api/v1/uploads/1/mapping', ['{}']);
		expect(unknown.status).toBe(411);
		expect(JSON.parse(unknown.body)).toMatchObject({ detail: bodyLengthNeeded() });
	});
});
