import { execFile } from 'node:child_process';
import { promisify } from 'node:util';
import { eq } from 'drizzle-orm';
import { afterEach, expect, it } from 'vitest';
import { appendAudit } from '$lib/server/db/appendAudit';
import { job } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { addPerson } from '$lib/server/services/addPerson';
import { noSuchPerson } from '$lib/core/messages/people';
import { enqueue } from '$lib/server/work/enqueue';
import { endServer, ORIGIN, PASSWORD, serveApplication, startServer } from '../servedApplication';
import type { ServedApplication } from '../servedApplication';

let served: ServedApplication | undefined;
afterEach(async () => {
	await served?.stop();
	served = undefined;
});

/** Reads an event stream until it says this. */
async function heard(response: Response, wanted: string): Promise<boolean> {
	const decoder = new TextDecoder();
	let said = '';
	for await (const part of response.body ?? []) {
		said += decoder.decode(part, { stream: true });
		if (said.includes(wanted)) return true;
	}
	return false;
}

it('ends in order within a moment, streams and jobs included', async () => {
	served = await serveApplication();
	const cookie = await served.cookieOf(served.people.reader);
	const stream = await fetch(`${served.url}/api/v1/events`, { headers: { cookie } });
	expect(stream.headers.get('content-type')).toBe('text/event-stream');

	const start = performance.now();
	const ending = endServer(served.process);
	expect(await heard(stream, 'never said')).toBe(false);
	expect(await ending).toBe(0);
	// The adapter cuts connections off after 30 s; an event stream that does not end waits for that.
	expect(performance.now() - start).toBeLessThan(15_000);
}, 60_000);

it('survives a reader of the event stream who goes away', async () => {
	served = await serveApplication();
	const cookie = await served.cookieOf(served.people.reader);
	const leave = new AbortController();
	await fetch(`${served.url}/api/v1/events`, { headers: { cookie }, signal: leave.signal });
	leave.abort();
	await write(served.db, (tx) => appendAudit(tx, { action: 'a', subject: 'b', by: null }));
	await new Promise((next) => setTimeout(next, 1000));
	expect((await fetch(`${served.url}/healthz`)).status).toBe(200);
}, 60_000);

it('tells the readers of one process what another committed', async () => {
	served = await serveApplication();
	const second = await startServer({ DATA_DIR: served.dataDir, ORIGIN });
	try {
		const cookie = await served.cookieOf(served.people.product_engineer);
		const stream = await fetch(`${second.url}/api/v1/events`, { headers: { cookie } });
		const telling = heard(stream, 'event: change');
		await new Promise((next) => setTimeout(next, 300));
		const answer = await fetch(`${served.url}/account?/createToken`, {
			method: 'POST',
			headers: { cookie, origin: ORIGIN, 'content-type': 'application/x-www-form-urlencoded' },
			body: 'name=made'
		});
		expect(answer.status).toBe(200);
		expect(await telling).toBe(true);
	} finally {
		expect(await endServer(second.child)).toBe(0);
	}
}, 60_000);

it('has a job done in its worker thread, and shows how it ended', async () => {
	served = await serveApplication();
	const { db } = served;
	// No handler does this kind: the thread says so, and people read that it was our fault.
	const id = await write(db, (tx) =>
		enqueue(tx, { kind: 'nobody-does-this', payload: {}, dedupeKey: 'x', by: null })
	);
	const headers = { authorization: `Bearer ${served.people.product_engineer.token}` };
	let state: unknown;
	for (let turn = 0; turn < 200 && state !== 'failed'; turn += 1) {
		await new Promise((next) => setTimeout(next, 100));
		const answer = await fetch(`${served.url}/api/v1/jobs/${id}`, { headers });
		({ state } = (await answer.json()) as { state: unknown });
	}
	expect(state).toBe('failed');
	const [row] = await db.select().from(job).where(eq(job.id, id));
	expect(row).toMatchObject({ attempt: 1, leaseUntil: null });
	expect(served.log()).toContain('no handler does jobs of kind nobody-does-this');
	expect(served.log()).not.toContain('there is no built worker');
}, 60_000);

it('refuses to start with an environment it cannot use, and names every variable', async () => {
	await expect(startServer({ DEMO: 'maybe', LOG_LEVEL: 'loud' })).rejects.toThrow(
		/ended with 1 .*can't be used\. DEMO: .*LOG_LEVEL: [^\n]*\n$/
	);
}, 60_000);

const run = promisify(execFile);
const token = (env: Record<string, string>, ...args: string[]) =>
	run(process.execPath, ['build/tasks/token.js', ...args], {
		env: { PATH: process.env.PATH, ...env }
	});

it('prints a token on the command line, and nothing else', async () => {
	served = await serveApplication();
	const env = { DATA_DIR: served.dataDir };
	const { email } = served.people.product_engineer;
	const { stdout } = await token(env, '--email', email.toUpperCase());
	expect(stdout).toMatch(/^platen_[\w-]{43}\n$/);
	const headers = { authorization: `Bearer ${stdout.trim()}` };
	expect((await fetch(`${served.url}/api/v1/products`, { headers })).status).toBe(200);

	await expect(token(env, '--email', 'nobody@larkmoor.test')).rejects.toMatchObject({
		code: 1,
		stdout: '',
		stderr: expect.stringContaining(noSuchPerson('nobody@larkmoor.test')) as string
	});
	await expect(token(env)).rejects.toMatchObject({ code: 1, stdout: '' });
}, 60_000);

it('lets the people of the demo come in by a button, and only them', async () => {
	served = await serveApplication({ DEMO: '1' });
	await addPerson(served, {
		name: 'Somebody else',
		email: 'else@example.test',
		roles: ['administrator'],
		password: PASSWORD,
		by: null
	});
	const page = await (await fetch(`${served.url}/sign-in`)).text();
	expect(page).toContain('value="marketing@larkmoor.test"');
	expect(page).not.toContain('else@example.test');

	const comeIn = (email: string) =>
		fetch(`${served?.url}/sign-in?/comeIn`, {
			method: 'POST',
			redirect: 'manual',
			headers: {
				origin: ORIGIN,
				accept: 'text/html',
				'content-type': 'application/x-www-form-urlencoded'
			},
			body: new URLSearchParams({ email }).toString()
		});
	expect((await comeIn('marketing@larkmoor.test')).headers.get('location')).toBe('/worklist');
	expect((await comeIn('else@example.test')).status).toBe(404);
	expect((await comeIn('nobody@larkmoor.test')).status).toBe(404);
}, 60_000);
