import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { fileNotFound, releaseNotFound, releaseWithdrawn } from '$lib/core/messages/publish';
import { signInFirst } from '$lib/core/messages';
import { findRelease } from '$lib/server/db/findRelease';
import { findReleaseFile } from '$lib/server/db/findReleaseFile';
import { ensureOrganization } from '$lib/server/services/ensureOrganization';
import { publishRelease } from '$lib/server/services/publishRelease';
import { publishReleaseJob } from '$lib/server/services/publishReleaseJob';
import { reinstateRelease, withdrawRelease } from '$lib/server/services/withdrawRelease';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import { GET as listAll } from '../../src/routes/api/v1/releases/+server';
import { GET as download } from '../../src/routes/api/v1/releases/[partNumber]/[version]/[file]/+server';
import {
	approve,
	documentOf,
	openReviewBench,
	PART,
	submit,
	type ReviewBench
} from '../factories/reviewBench';

const READER = {
	id: 'mira',
	name: 'Mira Okafor',
	email: 'reader@larkmoor.test',
	roles: ['reader']
};
const today = new Date().toISOString().slice(0, 10);
let bench: ReviewBench;
let release = 0;
let pdfHash = '';

beforeAll(async () => {
	bench = await openReviewBench();
	const revision = await submit(bench, documentOf(await bench.limitRows()));
	await approve(bench, revision);
	await publishRelease(bench.stores, { revision, effectiveFrom: today, by: 'noor' });
	await runOpenJobs(bench.stores, { 'publish-release': publishReleaseJob });
	release = (await findRelease(bench.stores.db, PART, '1.0'))?.id ?? 0;
	pdfHash = (await findReleaseFile(bench.stores.db, release, 'datasheet.pdf'))?.sha256 ?? '';
});
afterAll(() => bench.close());

const openLibrary = (libraryIsPublic: boolean) =>
	ensureOrganization(bench.stores, { settings: { libraryIsPublic }, by: null });
beforeEach(async () => {
	await openLibrary(true);
});

interface Asked {
	readonly person?: typeof READER;
	readonly version?: string;
	readonly file?: string;
	readonly ifNoneMatch?: string;
}

const locals = (person: typeof READER | undefined) => ({
	...bench.stores,
	person: person ?? null,
	isApi: true,
	path: '/api/v1/releases',
	log: { warn: () => undefined, error: () => undefined }
});

/** Only what the endpoints read of a request's event. */
const ask = ({ person, version = '1.0', file = 'datasheet.pdf', ifNoneMatch }: Asked = {}) =>
	download({
		locals: locals(person),
		params: { partNumber: PART, version, file },
		request: new Request('http://platen.test/', {
			headers: ifNoneMatch === undefined ? {} : { 'if-none-match': ifNoneMatch }
		})
	} as unknown as Parameters<typeof download>[0]);

const list = (person?: typeof READER) =>
	listAll({ locals: locals(person) } as unknown as Parameters<typeof listAll>[0]);

const refusal = async (response: Response) => {
	const body: unknown = await response.json();
	return { status: response.status, type: response.headers.get('content-type'), body };
};
const problem = (status: number, detail: string) => ({
	status,
	type: 'application/problem+json',
	body: expect.objectContaining({ status, detail }) as unknown
});

describe('a public library', () => {
	it('hands out the file with its hash as tag, to keep for good', async () => {
		const response = await ask();
		expect(response.status).toBe(200);
		expect(response.headers.get('etag')).toBe(`"${pdfHash}"`);
		expect(response.headers.get('content-type')).toBe('application/pdf');
		expect(response.headers.get('cache-control')).toBe('public, max-age=31536000, immutable');
		const bytes = Buffer.from(await response.arrayBuffer());
		expect(bytes.subarray(0, 5).toString()).toBe('%PDF-');
		expect(response.headers.get('content-length')).toBe(String(bytes.byteLength));
	});

	it.each([
		['the same tag', () => `"${pdfHash}"`, 304],
		['a weak one', () => `W/"${pdfHash}"`, 304],
		['one of several', () => `"other", "${pdfHash}"`, 304],
		['any', () => '*', 304],
		['another tag', () => '"other"', 200]
	])('answers a request that knows %s', async (_what, tag, status) => {
		const response = await ask({ ifNoneMatch: tag() });
		expect(response.status).toBe(status);
		expect(response.headers.get('etag')).toBe(`"${pdfHash}"`);
	});

	it('says what it has not', async () => {
		expect(await refusal(await ask({ version: '9.0' }))).toEqual(
			problem(404, releaseNotFound(PART, '9.0'))
		);
		expect(await refusal(await ask({ version: 'latest' }))).toEqual(
			problem(404, releaseNotFound(PART, 'latest'))
		);
		expect(await refusal(await ask({ file: 'model.lib' }))).toEqual(
			problem(404, fileNotFound('model.lib'))
		);
		expect((await ask({ file: 'constructor' })).status).toBe(404);
	});

	it('lists every release', async () => {
		const response = await list();
		expect(response.status).toBe(200);
		expect(await response.json()).toEqual({
			releases: [
				{
					partNumber: PART,
					version: '1.0',
					status: 'current',
					effectiveFrom: today,
					sha256: pdfHash
				}
			]
		});
	});

	it('hands out a withdrawn release to those who are signed in only', async () => {
		await withdrawRelease(bench.stores, { release, reason: 'Wrong marking.', by: 'noor' });
		expect(await refusal(await ask())).toEqual(problem(410, releaseWithdrawn(PART, '1.0')));
		const response = await ask({ person: READER });
		expect(response.status).toBe(200);
		expect(response.headers.get('cache-control')).toBe('private, no-cache');
		await reinstateRelease(bench.stores, { release, reason: 'It was right.', by: 'noor' });
		expect((await ask()).status).toBe(200);
	});
});

describe('a library for the company', () => {
	it('asks for a sign-in first', async () => {
		await openLibrary(false);
		expect(await refusal(await ask())).toEqual(problem(401, signInFirst()));
		expect(await refusal(await list())).toEqual(problem(401, signInFirst()));
	});

	it('hands out to a reader what no shared cache may keep', async () => {
		await openLibrary(false);
		const response = await ask({ person: READER });
		expect(response.status).toBe(200);
		expect(response.headers.get('cache-control')).toBe('private, no-cache');
		expect((await list(READER)).status).toBe(200);
	});
});
