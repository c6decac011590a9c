import { randomUUID } from 'node:crypto';
import { STATUS_CODES } from 'node:http';
import { isHttpError, isRedirect } from '@sveltejs/kit';
import type { Handle, HandleServerError, ServerInit } from '@sveltejs/kit';
import { sequence } from '@sveltejs/kit/hooks';
import { dev } from '$app/environment';
import {
	badToken,
	bodyLengthNeeded,
	bodyTooLarge,
	notFound,
	ourFault,
	tooManyAttempts,
	wrongOrigin
} from '$lib/core/messages';
import { application, closeApplication, openApplication, stopWork } from '$lib/server/application';
import { readAuditHead } from '$lib/server/auditHead';
import { personOfSession } from '$lib/server/auth/personOfSession';
import { personOfToken } from '$lib/server/auth/personOfToken';
import { bodyLimit } from '$lib/server/auth/bodyLimit';
import { isOwnOrigin } from '$lib/server/auth/ownOrigin';
import { ConfigError } from '$lib/server/config';
import { problem } from '$lib/server/problem';

export const init: ServerInit = async () => {
	await openApplication(process.env).catch(refuseToStart);
	if (dev) return;

	// The server waits for its open requests before it says `shutdown`, and event streams never end
	// by themselves.
	for (const signal of ['SIGTERM', 'SIGINT']) process.once(signal, () => void stopWork());
	process.once('sveltekit:shutdown', () => void closeApplication());
};

/** What an operator has to put right is said in one line, without the insides of the program. */
function refuseToStart(problem: unknown): never {
	if (!(problem instanceof ConfigError)) throw problem;
	process.stderr.write(`${problem.message}\n`);
	process.exit(1);
}

const CHANGES = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);
const REQUEST_ID = /^[\w.-]{1,64}$/;

/** Gives the request an id, a log of its own and what it may touch; says how it ended. */
const request: Handle = async ({ event, resolve }) => {
	const { db, storage, sessions, signInAttempts, changes, config, log } = application();
	const given = event.request.headers.get('x-request-id');
	const requestId = given !== null && REQUEST_ID.test(given) ? given : randomUUID();
	event.locals.requestId = requestId;
	event.locals.db = db;
	event.locals.storage = storage;
	event.locals.sessions = sessions;
	event.locals.signInAttempts = signInAttempts;
	event.locals.changes = changes;
	event.locals.uploadLimit = config.uploadLimitBytes;
	event.locals.isDemo = config.isDemo;
	event.locals.auditHead = () => readAuditHead(config.dataDir);
	event.locals.log = log.child({ requestId });
	event.locals.person = null;
	event.locals.sessionId = null;
	event.locals.isApi = event.url.pathname.startsWith('/api/');
	event.locals.path = event.url.pathname + event.url.search;

	const start = performance.now();
	const response = await resolve(event);
	response.headers.set('x-request-id', requestId);
	event.locals.log.info({
		method: event.request.method,
		path: event.url.pathname,
		status: response.status,
		milliseconds: Math.round(performance.now() - start),
		person: personId(event.locals)
	});
	return response;
};

const personId = (locals: App.Locals) => locals.person?.id;

/** Who is asking: by token on the API, by session otherwise. */
const person: Handle = async ({ event, resolve }) => {
	const { sessions, tokenAttempts } = application();
	const authorization = event.request.headers.get('authorization');

	if (event.locals.isApi && authorization !== null) {
		const address = event.getClientAddress();
		if (await tokenAttempts.isSpent(address)) return problem(429, tooManyAttempts());
		const found = await personOfToken(event.locals.db, authorization);
		if (found === undefined) {
			await tokenAttempts.spend(address);
			return problem(401, badToken());
		}
		event.locals.person = found;
		return resolve(event);
	}

	// A cookie goes along by itself, wherever a request was made up: so it must come from here.
	if (CHANGES.has(event.request.method)) {
		const { origin } = application().config;
		const { headers: said } = event.request;
		if (!isOwnOrigin(said.get('origin'), { origin, host: said.get('host') })) {
			return event.locals.isApi
				? problem(403, wrongOrigin())
				: new Response(wrongOrigin(), { status: 403 });
		}
	}
	await personOfSession(sessions, event);
	return resolve(event);
};

/** Bodies are small, except where a measurement file comes; there the service counts the bytes. */
const bodies: Handle = async ({ event, resolve }) => {
	const { headers: said, body } = event.request;
	if (body === null) return resolve(event);
	const limit = bodyLimit(event.url.pathname);
	const length = said.get('content-length');
	const refuse = (status: number, message: string) =>
		event.locals.isApi ? problem(status, message) : new Response(message, { status });
	if (length === null && limit !== Infinity) return refuse(411, bodyLengthNeeded());
	return Number(length) > limit ? refuse(413, bodyTooLarge(limit)) : resolve(event);
};

/** What the framework's content security policy does not say. */
const headers: Handle = async ({ event, resolve }) => {
	const response = await resolve(event);
	response.headers.set('x-content-type-options', 'nosniff');
	response.headers.set('referrer-policy', 'same-origin');
	response.headers.set('permissions-policy', 'camera=(), geolocation=(), microphone=()');
	response.headers.set('cross-origin-opener-policy', 'same-origin');
	response.headers.set('cross-origin-resource-policy', 'same-origin');
	return response;
};

/** Headers that go with a refusal, whatever its body. */
const KEPT = ['allow', 'retry-after'];

/** The API answers with problem details, whatever refused. */
const problems: Handle = async ({ event, resolve }) => {
	if (!event.locals.isApi) return resolve(event);
	// The framework answers an error as JSON to who asks for it, and as a page to a browser.
	event.request.headers.set('accept', 'application/json');

	const response = await answered(() => resolve(event), event.locals);
	if (response.status < 400) return response;
	const type = response.headers.get('content-type') ?? '';
	const refusal = type.startsWith('application/problem+json')
		? response
		: problem(response.status, await detailOf(response, event.locals.requestId));
	for (const name of KEPT) {
		const value = response.headers.get(name);
		if (value !== null) refusal.headers.set(name, value);
	}
	// RFC 9110, 11.6.1: a 401 says how to sign in.
	if (response.status === 401) refusal.headers.set('www-authenticate', 'Bearer');
	return refusal;
};

/** What another handle throws never reaches the framework's own error page. */
async function answered(
	answer: () => Promise<Response> | Response,
	{ log, requestId }: App.Locals
): Promise<Response> {
	try {
		return await answer();
	} catch (thrown) {
		if (isRedirect(thrown)) throw thrown;
		if (isHttpError(thrown)) return problem(thrown.status, thrown.body.message);
		log.error({ err: thrown });
		return problem(500, ourFault(requestId));
	}
}

async function detailOf(response: Response, requestId: string): Promise<string> {
	const type = response.headers.get('content-type') ?? '';
	const text = await response.text();
	if (type.includes('json')) {
		const said: unknown = JSON.parse(text);
		if (typeof said === 'object' && said !== null && 'message' in said) return String(said.message);
	}
	if (response.status === 404) return notFound();
	if (response.status >= 500) return ourFault(requestId);
	return type.startsWith('text/plain') ? text : (STATUS_CODES[response.status] ?? 'Refused');
}

export const handle = sequence(headers, request, problems, bodies, person);

export const handleError: HandleServerError = ({ error, event, status, message }) => {
	const { requestId } = event.locals;
	if (status === 404) return { message: notFound(), requestId };
	if (status < 500) return { message, requestId };
	event.locals.log.error({ err: error });
	return { message: ourFault(requestId), requestId };
};
