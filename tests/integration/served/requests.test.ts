import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { badToken, mayNot, notFound, signInFirst, wrongOrigin } from '$lib/core/messages';
import { createToken } from '$lib/server/services/createToken';
import { ORIGIN, PASSWORD, serveApplication } from '../servedApplication';
import type { ServedApplication } from '../servedApplication';

let served: ServedApplication;
beforeAll(async () => {
	served = await serveApplication();
}, 60_000);
afterAll(() => served.stop());

const ask = (path: string, init: RequestInit = {}) =>
	fetch(served.url + path, { redirect: 'manual', ...init });
const bearer = (token: string) => ({ authorization: `Bearer ${token}` });
/** As a browser without scripts posts a form. */
const form = { 'content-type': 'application/x-www-form-urlencoded', accept: 'text/html' };

async function problemOf(response: Response) {
	expect(response.headers.get('content-type')).toBe('application/problem+json');
	return (await response.json()) as { status: number; title: string; detail: string };
}

describe('health', () => {
	it('says that it lives and that it is ready, without a sign-in', async () => {
		expect((await ask('/healthz')).status).toBe(200);
		expect((await ask('/readyz')).status).toBe(200);
	});
});

describe('request ids', () => {
	it('takes one over and logs it, makes one up, and takes nothing that could break a log', async () => {
		const given = await ask('/healthz', { headers: { 'x-request-id': 'from-the-proxy.1' } });
		expect(given.headers.get('x-request-id')).toBe('from-the-proxy.1');
		await vi.waitFor(() => expect(served.log()).toContain('"requestId":"from-the-proxy.1"'));
		const own = (await ask('/healthz')).headers.get('x-request-id');
		expect(own).toMatch(/^[0-9a-f-]{36}$/);
		const odd = await ask('/healthz', { headers: { 'x-request-id': 'a b"c' } });
		expect(odd.headers.get('x-request-id')).toMatch(/^[0-9a-f-]{36}$/);
	});
});

describe('headers of a page', () => {
	it('has a policy with a nonce, and lets nobody sniff, frame or refer', async () => {
		const response = await ask('/sign-in');
		const policy = response.headers.get('content-security-policy') ?? '';
		const nonce = /'nonce-([^']+)'/.exec(policy)?.[1];
		expect(policy).toContain("default-src 'none'");
		expect(policy).not.toMatch(/script-src[^;]*unsafe/);
		expect(nonce).toBeDefined();
		const page = await response.text();
		for (const [script] of page.matchAll(/<script[^>]*>/g))
			expect(script).toContain(`nonce="${nonce}"`);
		expect(response.headers.get('x-content-type-options')).toBe('nosniff');
		expect(response.headers.get('referrer-policy')).toBe('same-origin');
		expect(response.headers.get('permissions-policy')).toContain('camera=()');
	});
});

describe('bearer tokens', () => {
	it('give the permissions of their owner, and need no origin', async () => {
		const { product_engineer: engineer, reader } = served.people;
		expect((await ask('/api/v1/products', { headers: bearer(engineer.token) })).status).toBe(200);

		const refused = await ask('/api/v1/products', { headers: bearer(reader.token) });
		expect(refused.status).toBe(403);
		expect(await problemOf(refused)).toMatchObject({ status: 403, detail: mayNot('product.read') });
	});

	it.each(['text/csv', 'application/json', 'application/x-www-form-urlencoded'])(
		'change things without an origin, whatever they send: %s',
		async (type) => {
			const answer = await ask('/api/v1/products/LKX-0000/measurement-sets?filename=a.csv', {
				method: 'POST',
				headers: { ...bearer(served.people.product_engineer.token), 'content-type': type },
				body: 'lot,wafer\n'
			});
			expect(answer.status).toBe(404);
		}
	);

	it('are refused when they are not known, even beside a good cookie', async () => {
		const cookie = await served.cookieOf(served.people.product_engineer);
		for (const authorization of ['Bearer platen_nothing', 'Bearer', 'Basic aWRhOmlkYQ==']) {
			const answer = await ask('/api/v1/products', { headers: { authorization, cookie } });
			expect(answer.status).toBe(401);
			expect(answer.headers.get('www-authenticate')).toBe('Bearer');
			expect((await problemOf(answer)).detail).toBe(badToken());
		}
	});

	it('open no page', async () => {
		const answer = await ask('/worklist', { headers: bearer(served.people.administrator.token) });
		expect(answer.status).toBe(303);
		expect(answer.headers.get('location')).toMatch(/^\/sign-in/);
	});

	it('are never written into the log', async () => {
		const token = await createToken(served, { person: served.people.reader.id, name: 'secret' });
		await ask('/api/v1/releases', { headers: bearer(token) });
		await vi.waitFor(() => expect(served.log()).toContain('/api/v1/releases'));
		expect(served.log()).not.toContain(token);
	});
});

describe('cookies', () => {
	const create = async (headers: Record<string, string>) =>
		ask('/account?/createToken', {
			method: 'POST',
			headers: {
				...form,
				cookie: await served.cookieOf(served.people.reader),
				...headers
			},
			body: 'name=made'
		});

	it.each([
		['no origin', {}],
		['another origin', { origin: 'http://elsewhere.test' }],
		['an opaque origin', { origin: 'null' }],
		['the address the server listens at', { origin: 'http://127.0.0.1' }]
	])('change nothing with %s', async (_case, headers: Record<string, string>) => {
		const answer = await create(headers);
		expect(answer.status).toBe(403);
		expect(await answer.text()).toBe(wrongOrigin());
	});

	it('change things from a page of ours', async () => {
		expect((await create({ origin: ORIGIN })).status).toBe(200);
	});

	it.each(['text/csv', 'application/json', 'text/plain'])(
		'change nothing on the API from elsewhere, whatever is sent: %s',
		async (type) => {
			const answer = await ask('/api/v1/products/LKX-0000/measurement-sets?filename=a.csv', {
				method: 'POST',
				headers: {
					cookie: await served.cookieOf(served.people.product_engineer),
					'content-type': type,
					origin: 'http://elsewhere.test'
				},
				body: 'lot,wafer\n'
			});
			expect(answer.status).toBe(403);
			expect((await problemOf(answer)).detail).toBe(wrongOrigin());
		}
	);
});

describe('refusals of the API', () => {
	it('are problem details also for a browser that asks for a page', async () => {
		const answer = await ask('/api/v1/products', { headers: { accept: 'text/html' } });
		expect(answer.status).toBe(401);
		expect(await problemOf(answer)).toMatchObject({
			status: 401,
			title: 'Unauthorized',
			detail: signInFirst()
		});
	});

	it('name what is not there and what a place cannot do', async () => {
		const headers = bearer(served.people.administrator.token);
		const absent = await ask('/api/v1/nothing-here', { headers });
		expect(absent.status).toBe(404);
		expect((await problemOf(absent)).detail).toBe(notFound());

		const odd = await ask('/api/v1/products', { method: 'DELETE', headers });
		expect(odd.status).toBe(405);
		expect(odd.headers.get('allow')).toContain('GET');
		await problemOf(odd);
	});

	it('hold a body small where no file is expected', async () => {
		const answer = await ask('/api/v1/products', {
			method: 'POST',
			headers: bearer(served.people.administrator.token),
			body: 'x'.repeat(1_100_000)
		});
		expect(answer.status).toBe(413);
		await problemOf(answer);
	});
});

describe('signing in', () => {
	const signIn = (email: string, password: string) =>
		ask('/sign-in?/signIn&to=%2Flibrary', {
			method: 'POST',
			headers: { ...form, origin: ORIGIN },
			body: new URLSearchParams({ email, password }).toString()
		});

	it('begins a session and leads where the person wanted to go', async () => {
		const { email } = served.people.marketing;
		const answer = await signIn(email, PASSWORD);
		expect(answer.status).toBe(303);
		expect(answer.headers.get('location')).toBe('/library');
		const cookie = answer.headers.get('set-cookie') ?? '';
		expect(cookie).toMatch(/HttpOnly/i);
		expect(cookie).toMatch(/SameSite=Lax/i);
		expect(cookie).not.toMatch(/Secure/i);

		const page = await ask('/worklist', { headers: { cookie: cookie.split(';')[0] ?? '' } });
		expect(page.status).toBe(200);
		expect(await page.text()).toContain('marketing');
	});

	it('answers a wrong password and an unknown person with the same page, and keeps the email', async () => {
		const normal = (text: string, email: string) =>
			text
				.replaceAll(email, 'EMAIL')
				.replaceAll(/nonce[-=]"?[^"';>]+/g, '')
				.replaceAll(/"?id"?:"[^"]+"/g, '');
		const wrong = await signIn('marketing@larkmoor.test', 'not the password');
		const unknown = await signIn('nobody-here@larkmoor.test', 'not the password');
		expect([wrong.status, unknown.status]).toEqual([400, 400]);
		const page = await wrong.text();
		expect(page).toContain('value="marketing@larkmoor.test"');
		expect(page).not.toContain('not the password');
		expect(normal(page, 'marketing@larkmoor.test')).toBe(
			normal(await unknown.text(), 'nobody-here@larkmoor.test')
		);
	});

	it('leads nobody away from here', async () => {
		const answer = await ask(`/sign-in?/signIn&to=${encodeURIComponent('//elsewhere.test')}`, {
			method: 'POST',
			headers: { ...form, origin: ORIGIN },
			body: new URLSearchParams({
				email: served.people.reader.email,
				password: PASSWORD
			}).toString()
		});
		expect(answer.headers.get('location')).toBe('/worklist');
	});

	it('lets nobody in without a password outside the demo', async () => {
		const answer = await ask('/sign-in?/comeIn', {
			method: 'POST',
			headers: { ...form, origin: ORIGIN },
			body: 'email=administrator%40larkmoor.test'
		});
		expect(answer.status).toBe(404);
		expect(answer.headers.get('set-cookie')).toBeNull();
	});

	it('pauses after ten wrong passwords', async () => {
		const { email } = served.people.applications_engineer;
		for (let turn = 0; turn < 10; turn += 1)
			expect((await signIn(email, 'wrong')).status).toBe(400);
		expect((await signIn(email, PASSWORD)).status).toBe(429);
	});
});

describe('signing out', () => {
	it('ends this session alone, or everywhere', async () => {
		const { administrator } = served.people;
		const cookies = await Promise.all([1, 2, 3].map(() => served.cookieOf(administrator)));
		const [first = '', second = '', third = ''] = cookies;
		const isIn = async (cookie: string) =>
			(await ask('/worklist', { headers: { cookie } })).status === 200;
		const post = (path: string, cookie: string) =>
			ask(path, { method: 'POST', headers: { ...form, origin: ORIGIN, cookie } });

		await post('/sign-out', first);
		expect([await isIn(first), await isIn(second)]).toEqual([false, true]);
		await post('/account?/signOutEverywhere', second);
		expect([await isIn(second), await isIn(third)]).toEqual([false, false]);
	});
});
