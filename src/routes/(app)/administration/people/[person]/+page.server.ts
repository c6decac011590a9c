import { error, redirect } from '@sveltejs/kit';
import { fail, setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { notFound } from '$lib/core/messages';
import { changePersonForm } from '$lib/forms/person';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPeople } from '$lib/server/db/listPeople';
import { changePerson } from '$lib/server/services/changePerson';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	requirePermission(locals, 'people.manage');
	const found = (await listPeople(locals.db)).find(({ id }) => id === params.person);
	if (found === undefined) error(404, notFound());

	const { name, email, roles, isActive } = found;
	const form = await superValidate({ name, roles: [...roles], isActive }, zod4(changePersonForm));
	return { email, form };
};

export const actions: Actions = {
	change: async ({ locals, params, request }) => {
		const administrator = requirePermission(locals, 'people.manage');
		const form = await superValidate(request, zod4(changePersonForm));
		if (!form.valid) return fail(400, { form });

		const outcome = await changePerson(locals, {
			...form.data,
			person: params.person,
			by: administrator.id
		});
		if (outcome.status === 'absent') error(404, notFound());
		if (outcome.status === 'refused') return setError(form, 'roles._errors', outcome.message);
		redirect(303, '/administration/people');
	}
};
