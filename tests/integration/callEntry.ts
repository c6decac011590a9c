import { routeParts } from './entries';
import type { Entry } from './entries';
import { ORIGIN } from './servedApplication';

/** How the server answered, in the terms of the access table. */
export type Answer =
	| { readonly status: 'passed'; readonly code: number }
	/** 401 or 403, or the way to the sign-in page and back. */
	| { readonly status: 'refused'; readonly code: number }
	| { readonly status: 'broken'; readonly code: number };

/** What stands in an address for its parameters: nothing of it exists. */
const VALUES: Readonly<Record<string, string>> = {
	partNumber: 'LKX-0000',
	version: '1.0',
	file: 'datasheet.pdf'
};

const addressOf = (route: string): string =>
	route.replace(/\[+\.*(\w+)(?:=\w+)?\]+/g, (_whole, name: string) => VALUES[name] ?? '999999');

/** Calls an entry as the browser or a script would. */
export async function callEntry(
	server: string,
	entry: Entry,
	headers: Readonly<Record<string, string>>
): Promise<Answer> {
	switch (entry.kind) {
		case 'endpoint':
			return callEndpoint(server, entry, headers);
		case 'action':
			return callAction(server, entry, headers);
		case 'load':
		case 'layout':
			return callLoad(server, entry, headers);
		default:
			return entry.kind satisfies never;
	}
}

async function callEndpoint(
	server: string,
	{ route, member }: Entry,
	headers: Readonly<Record<string, string>>
): Promise<Answer> {
	const hasBody = !['GET', 'HEAD'].includes(member);
	const response = await fetch(server + addressOf(route), {
		method: member,
		redirect: 'manual',
		headers: { ...headers, ...(hasBody ? { origin: ORIGIN } : {}) }
	});
	await response.body?.cancel();
	return answer(response.status, response.headers.get('location'));
}

/** As `use:enhance` posts a form: the outcome stands in the body. */
async function callAction(
	server: string,
	{ route, member }: Entry,
	headers: Readonly<Record<string, string>>
): Promise<Answer> {
	const query = member === 'default' ? '' : `?/${member}`;
	const response = await fetch(server + addressOf(route) + query, {
		method: 'POST',
		redirect: 'manual',
		headers: {
			...headers,
			origin: ORIGIN,
			accept: 'application/json',
			'x-sveltekit-action': 'true',
			'content-type': 'application/x-www-form-urlencoded'
		}
	});
	const said = await bodyOf(response);
	const status = said.type === 'error' || said.status === undefined ? response.status : said.status;
	return answer(status, said.location);
}

/** As the browser asks for one load alone; the others are skipped. */
async function callLoad(
	server: string,
	entry: Entry,
	headers: Readonly<Record<string, string>>
): Promise<Answer> {
	const { page, index, count } = placeOf(entry);
	const address = addressOf(page).replace(/\/$/, '');
	const wanted = Array.from({ length: count }, (_, at) => (at === index ? '1' : '0')).join('');
	const response = await fetch(
		`${server}${address}/__data.json?x-sveltekit-invalidated=${wanted}`,
		{ redirect: 'manual', headers }
	);
	const said = await bodyOf(response);
	if (said.type === 'redirect') return answer(307, said.location);
	const node = said.nodes?.[index];
	if (node === undefined) return answer(response.status, null);
	if (node?.type === 'skip') throw new Error(`${entry.name} was skipped, not called`);
	return answer(node?.type === 'error' ? (node.status ?? 500) : response.status, null);
}

interface Said {
	readonly type?: string;
	readonly status?: number;
	readonly location?: string;
	readonly nodes?: readonly ({ readonly type: string; readonly status?: number } | null)[];
}

async function bodyOf(response: Response): Promise<Said> {
	const text = await response.text();
	try {
		return JSON.parse(text) as Said;
	} catch {
		return {};
	}
}

function answer(code: number, location: string | null | undefined): Answer {
	if (code === 401 || code === 403 || (location ?? '').startsWith('/sign-in?to='))
		return { status: 'refused', code };
	return { status: code >= 500 ? 'broken' : 'passed', code };
}

/** Where among the loads of a page this one stands; for a layout, of some page below it. */
function placeOf({ kind, folder }: Entry): { page: string; index: number; count: number } {
	const pages = routeParts
		.flatMap((part) => /^\/src\/routes(.*)\/\+page\.svelte$/.exec(part)?.[1] ?? [])
		.filter((place) => (kind === 'layout' ? `${place}/`.startsWith(`${folder}/`) : true));
	const own = kind === 'layout' ? pages[0] : folder;
	if (own === undefined) throw new Error(`no page stands below ${folder}`);
	const layouts = ancestors(own).filter(hasLayout);
	const page = own.replace(/\/\([^)]*\)/g, '') || '/';
	const index = kind === 'layout' ? layouts.indexOf(folder) : layouts.length;
	return { page, index, count: layouts.length + 1 };
}

/** `/a/b` → ``, `/a`, `/a/b`. */
const ancestors = (folder: string): string[] =>
	folder.split('/').map((_step, index, steps) => steps.slice(0, index + 1).join('/'));

/** Kit gives the root a layout of its own, and an error page takes a place among the layouts. */
const hasLayout = (folder: string): boolean =>
	folder === '' ||
	routeParts.some((part) => part.startsWith(`/src/routes${folder}/+`) && isLayout(part, folder));

const isLayout = (part: string, folder: string): boolean =>
	/^\+(layout|error)\./.test(part.slice(`/src/routes${folder}/`.length));
