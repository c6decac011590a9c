import { redirect } from '@sveltejs/kit';
import { fail, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { tokenRevoked } from '$lib/core/messages/people';
import { ROLE_NAMES } from '$lib/core/review/permissions';
import { newTokenForm, revokeTokenForm } from '$lib/forms/token';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listTokens } from '$lib/server/db/listTokens';
import { createToken } from '$lib/server/services/createToken';
import { revokeToken } from '$lib/server/services/revokeToken';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals }) => {
	const person = requirePermission(locals, 'account.manage');
	return {
		account: { ...person, roles: person.roles.map((role) => ROLE_NAMES[role]) },
		tokens: await listTokens(locals.db, person.id),
		form: await superValidate(zod4(newTokenForm))
	};
};

export const actions: Actions = {
	createToken: async ({ locals, request }) => {
		const person = requirePermission(locals, 'account.manage');
		const form = await superValidate(request, zod4(newTokenForm));
		if (!form.valid) return fail(400, { form });

		const token = await createToken(locals, { person: person.id, name: form.data.name });
		return { form, token };
	},

	revokeToken: async ({ locals, request }) => {
		const person = requirePermission(locals, 'account.manage');
		const read = revokeTokenForm.safeParse(Object.fromEntries(await request.formData()));
		if (!read.success) return fail(400);

		await revokeToken(locals, { token: read.data.token, by: person.id });
		return { said: tokenRevoked() };
	},

	signOutEverywhere: async ({ locals, cookies }) => {
		const person = requirePermission(locals, 'account.manage');
		await locals.sessions.invalidateUserSessions(person.id);
		const { name, value, attributes } = locals.sessions.createBlankSessionCookie();
		cookies.set(name, value, { path: '/', ...attributes });
		redirect(303, '/sign-in');
	}
};
