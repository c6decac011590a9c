import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { isPermitted, ROLES } from '$lib/core/review/permissions';
import type { Role } from '$lib/core/review/permissions';
import { ensureOrganization } from '$lib/server/services/ensureOrganization';
import { ACCESS } from './access';
import type { Access } from './access';
import { callEntry } from './callEntry';
import { allEntries } from './entries';
import type { Entry } from './entries';
import { serveApplication } from './servedApplication';
import type { ServedApplication } from './servedApplication';

const entries = allEntries();
const listed = entries.filter(({ name }) => name in ACCESS);

/** Whether the table lets this role, or nobody, through. */
function isLetThrough(access: Access, role: Role | 'nobody', libraryIsPublic: boolean): boolean {
	if (access === 'public') return true;
	if (access === 'library' && libraryIsPublic) return true;
	if (role === 'nobody') return false;
	return isPermitted([role], access === 'library' ? 'release.read' : access);
}

describe.each([false, true])('with a library that is public: %s', (libraryIsPublic) => {
	let served: ServedApplication;
	beforeAll(async () => {
		served = await serveApplication();
		await ensureOrganization(served, { settings: { libraryIsPublic }, by: null });
	}, 60_000);
	afterAll(() => served.stop());

	const wanted = libraryIsPublic ? listed.filter(({ name }) => ACCESS[name] === 'library') : listed;

	it.each(wanted)('$name lets through whom the table says, and refuses the rest', async (entry) => {
		const access = ACCESS[entry.name];
		if (access === undefined) throw new Error('the entry is not listed');
		for (const role of [...ROLES, 'nobody'] as const) {
			const answer = await callEntry(served.url, entry, await headersOf(entry, role));
			const said = `${entry.name} as ${role}: ${answer.code}`;
			if (isLetThrough(access, role, libraryIsPublic)) expect(answer.status, said).toBe('passed');
			else {
				expect(answer.status, said).toBe('refused');
				if (role !== 'nobody') expect(answer.code, said).toBe(403);
			}
		}
	});

	/** Scripts come with a token, browsers with a session that this one call may end. */
	async function headersOf(
		{ route }: Entry,
		role: Role | 'nobody'
	): Promise<Record<string, string>> {
		if (role === 'nobody') return {};
		const person = served.people[role];
		return route.startsWith('/api/')
			? { authorization: `Bearer ${person.token}` }
			: { cookie: await served.cookieOf(person) };
	}
});
