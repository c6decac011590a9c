import { fail, message, setError, superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { personAdded } from '$lib/core/messages/people';
import { ROLE_NAMES } from '$lib/core/review/permissions';
import { newPersonForm } from '$lib/forms/person';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPeople } from '$lib/server/db/listPeople';
import { addPerson } from '$lib/server/services/addPerson';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, depends }) => {
	depends('platen:data');
	requirePermission(locals, 'people.manage');
	const people = await listPeople(locals.db);
	return {
		people: people.map((one) => ({ ...one, roles: one.roles.map((role) => ROLE_NAMES[role]) })),
		form: await superValidate(zod4(newPersonForm))
	};
};

export const actions: Actions = {
	add: async ({ locals, request }) => {
		const administrator = requirePermission(locals, 'people.manage');
		const form = await superValidate(request, zod4(newPersonForm));
		const { password, ...rest } = form.data;
		form.data.password = '';
		if (!form.valid) return fail(400, { form });

		const outcome = await addPerson(locals, { ...rest, password, by: administrator.id });
		if (outcome.status === 'refused') return setError(form, 'email', outcome.message);
		return message(form, personAdded(rest.name));
	}
};
