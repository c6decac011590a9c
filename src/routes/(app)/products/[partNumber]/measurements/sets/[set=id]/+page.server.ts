import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { measurementMessages } from '$lib/core/messages/measurements';
import { isPermitted } from '$lib/core/review/permissions';
import { verdictForm, verdictReason } from '$lib/forms/verdictForm';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findMeasurementSet } from '$lib/server/db/findMeasurementSet';
import { listSuspects } from '$lib/server/db/listSuspects';
import { giveVerdict } from '$lib/server/services/giveVerdict';
import type { Actions, PageServerLoad } from './$types';

async function setOf({ db }: App.Locals, params: { set: string; partNumber: string }) {
	const id = Number(params.set);
	const found = await findMeasurementSet(db, id);
	if (found === undefined || found.partNumber !== params.partNumber) {
		error(404, measurementMessages.setNotFound(id));
	}
	return found;
}

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'measurement.read');
	const set = await setOf(locals, params);
	const suspects = (await listSuspects(locals.db, set.id)).map((entry) => ({
		...entry,
		id: `${entry.device}-${entry.conditionKey}`
	}));
	const chosen = suspects.find(({ id }) => id === url.searchParams.get('sweep'));
	return {
		set,
		suspects,
		chosen: chosen ?? null,
		canDecide: isPermitted(person.roles, 'verdict.give'),
		form: await superValidate(
			{ device: chosen?.device ?? 0, conditionKey: chosen?.conditionKey ?? '' },
			zod4(verdictForm),
			{ errors: false }
		)
	};
};

export const actions: Actions = {
	verdict: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'verdict.give');
		const set = await setOf(locals, params);
		const form = await superValidate(request, zod4(verdictForm));
		if (!form.valid) return fail(400, { form, message: undefined });
		const { device, conditionKey, decision } = form.data;
		const outcome = await giveVerdict(locals, {
			set: set.id,
			device,
			conditionKey,
			decision,
			reason: verdictReason(form.data),
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { form, message: outcome.message });
		redirect(303, `/products/${encodeURIComponent(params.partNumber)}/measurements/sets/${set.id}`);
	}
};
