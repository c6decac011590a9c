import { isHttpError, isRedirect } from '@sveltejs/kit';
import { expect, it } from 'vitest';
import { mayNot, signInFirst } from '$lib/core/messages';
import { requirePermission } from './requirePermission';
import type { Asking } from './requirePermission';

const reader = { id: 'mira', name: 'Mira Okafor', email: 'mira@larkmoor.test', roles: ['reader'] };

const asking = (wanted: Partial<Asking>): Asking => ({
	person: null,
	isApi: false,
	path: '/products?search=a&b',
	...wanted
});

function thrownBy(work: () => unknown): unknown {
	try {
		work();
	} catch (problem) {
		return problem;
	}
	throw new Error('nothing was thrown');
}

it('answers who is asking when a role of theirs permits it', () => {
	const person = { ...reader, roles: ['reader', 'marketing'] as const };
	expect(requirePermission(asking({ person }), 'release.publish')).toEqual(person);
});

it('sends nobody to the sign-in page, and remembers where they wanted to go', () => {
	const thrown = thrownBy(() => requirePermission(asking({}), 'product.read'));
	expect(isRedirect(thrown)).toBe(true);
	expect(thrown).toMatchObject({
		status: 303,
		location: '/sign-in?to=%2Fproducts%3Fsearch%3Da%26b'
	});
});

it('answers nobody on the API with 401', () => {
	const thrown = thrownBy(() => requirePermission(asking({ isApi: true }), 'product.read'));
	expect(isHttpError(thrown, 401)).toBe(true);
	expect(thrown).toMatchObject({ body: { message: signInFirst() } });
});

it.each([true, false])('refuses whom no role permits it with 403 and the role; API %s', (isApi) => {
	const person = { ...reader, roles: ['reader'] as const };
	const thrown = thrownBy(() => requirePermission(asking({ person, isApi }), 'revision.approve'));
	expect(isHttpError(thrown, 403)).toBe(true);
	expect(thrown).toMatchObject({ body: { message: mayNot('revision.approve') } });
	expect(mayNot('revision.approve')).toContain('applications engineer');
});
