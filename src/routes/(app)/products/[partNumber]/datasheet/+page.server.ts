import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { draftMessages } from '$lib/core/messages/datasheet';
import { isPermitted } from '$lib/core/review/permissions';
import { bindingBindForm } from '$lib/forms/bindingBind';
import { bindingClearForm } from '$lib/forms/bindingClear';
import { bindingReasonForm } from '$lib/forms/bindingReason';
import { draftOpenForm } from '$lib/forms/draftOpen';
import { draftSettingsForm } from '$lib/forms/draftSettings';
import { ratingForm } from '$lib/forms/rating';
import { textBlockForm } from '$lib/forms/textBlock';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findOpenRevision } from '$lib/server/db/findOpenRevision';
import { listPolicies } from '$lib/server/db/findPolicies';
import { findReturnedRevision } from '$lib/server/db/findReturnedRevision';
import { listTemplates } from '$lib/server/db/findTemplates';
import { listComments } from '$lib/server/db/listComments';
import { bindEverything } from '$lib/server/services/bindEverything';
import { bindSlot } from '$lib/server/services/bindSlot';
import { changeDraftSettings } from '$lib/server/services/changeDraftSettings';
import { keepBound } from '$lib/server/services/keepBound';
import { openDraft } from '$lib/server/services/openDraft';
import { setRating } from '$lib/server/services/setRating';
import { clearSlot, strikeOut } from '$lib/server/services/strikeOut';
import { submitRevision } from '$lib/server/services/submitRevision';
import { viewDraft } from '$lib/server/services/viewDraft';
import { writeText } from '$lib/server/services/writeText';
import { draftSections } from './draftSections';
import { said, type Said } from '$lib/components/datasheet/said';
import type { Actions, PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	const person = requirePermission(locals, 'draft.read');
	depends('platen:data');
	const view = await viewDraft(locals.db, params.partNumber);
	if (view.status === 'unknown') error(404, draftMessages.productUnknown(params.partNumber));
	const policies = (await listPolicies(locals.db)).map(({ id, rules }) => ({
		value: id,
		label: rules.name
	}));
	const common = {
		partNumber: view.product.partNumber,
		policies,
		may: {
			edit: isPermitted(person.roles, 'draft.edit'),
			write: isPermitted(person.roles, 'draft.write'),
			submit: isPermitted(person.roles, 'revision.submit')
		}
	};
	if (view.status === 'none') {
		const templates = await listTemplates(locals.db);
		const fitting = templates.filter(
			({ template }) => template.productClass === view.product.productClass
		);
		return {
			...common,
			draft: null,
			hasLimits: view.product.basisHash !== null,
			templates: fitting.map(({ key, number, template }) => ({
				value: key,
				label: `${template.name}, version ${number}`
			}))
		};
	}

	const { draft, resolved, product } = view;
	const returned = await findReturnedRevision(locals.db, product.id);
	const openRevision = await findOpenRevision(locals.db, product.id);
	return {
		...common,
		draft: {
			template: {
				key: draft.template.key,
				name: draft.template.name,
				number: draft.templateNumber
			},
			status: draft.status,
			policyVersion: draft.policyVersion,
			rowVersion: draft.rowVersion
		},
		sections: draftSections(draft, resolved),
		problems: resolved.problems,
		proof: resolved.proof,
		openRevision: openRevision && { number: openRevision.number, state: openRevision.state },
		returned: returned && {
			...returned,
			comments: await listComments(locals.db, returned.id)
		},
		selected: url.searchParams.get('slot'),
		isOpenOnly: url.searchParams.get('show') === 'open'
	};
};

const refuse = (status: 400 | 409, what: Omit<Said, 'isRefused'>) =>
	fail(status, said({ ...what, isRefused: true }));

export const actions: Actions = {
	open: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(draftOpenForm));
		if (!form.valid) return refuse(400, { message: firstError(form.errors) });
		const outcome = await openDraft(locals, { ...params, ...form.data, by: person.id });
		if (outcome.status === 'refused') return refuse(409, { message: outcome.message });
		redirect(303, `/products/${encodeURIComponent(params.partNumber)}/datasheet`);
	},
	settings: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(draftSettingsForm));
		if (!form.valid) return refuse(400, { message: firstError(form.errors) });
		const outcome = await changeDraftSettings(locals, { ...params, ...form.data, by: person.id });
		if (outcome.status === 'refused') return refuse(409, { message: outcome.message });
		return said({ message: draftMessages.settingsChanged() });
	},
	bindEverything: async ({ locals, params }) => {
		const person = requirePermission(locals, 'draft.edit');
		const outcome = await bindEverything(locals, { ...params, by: person.id });
		if (outcome.status === 'refused') return refuse(409, { message: outcome.message });
		const { bound, left } = outcome;
		return said({ message: draftMessages.everythingBound(bound.length, left.length), left });
	},
	bind: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(bindingBindForm));
		const { place, basisReason } = form.data;
		if (!form.valid) return refuse(400, { place, message: firstError(form.errors) });
		const outcome = await bindSlot(locals, { ...params, ...form.data, by: person.id });
		if (outcome.status === 'refused')
			return refuse(409, { place, message: outcome.message, typed: { basisReason } });
		return said({ place, message: draftMessages.bound() });
	},
	keep: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(bindingReasonForm));
		const { place, reason } = form.data;
		if (!form.valid) return refuse(400, { place, message: firstError(form.errors) });
		const outcome = await keepBound(locals, { ...params, ...form.data, by: person.id });
		if (outcome.status === 'refused')
			return refuse(409, { place, message: outcome.message, typed: { reason } });
		return said({ place, message: draftMessages.keptAsPrinted() });
	},
	strike: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(bindingReasonForm));
		const { place, reason } = form.data;
		if (!form.valid) return refuse(400, { place, message: firstError(form.errors) });
		const outcome = await strikeOut(locals, { ...params, place, reason, by: person.id });
		if (outcome.status === 'refused')
			return refuse(409, { place, message: outcome.message, typed: { reason } });
		return said({ place, message: draftMessages.struckOut() });
	},
	clear: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(bindingClearForm));
		const { place } = form.data;
		if (!form.valid) return refuse(400, { place, message: firstError(form.errors) });
		const outcome = await clearSlot(locals, { ...params, place, by: person.id });
		if (outcome.status === 'refused') return refuse(409, { place, message: outcome.message });
		return said({ place, message: draftMessages.cleared() });
	},
	rate: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.edit');
		const form = await superValidate(request, zod4(ratingForm));
		const { place, minimum, maximum, reason } = form.data;
		if (!form.valid) return refuse(400, { place, message: firstError(form.errors) });
		const typed = { minimum, maximum, reason };
		const outcome = await setRating(locals, { ...params, slot: place, ...typed, by: person.id });
		if (outcome.status === 'refused')
			return refuse(409, { place, message: outcome.message, typed });
		return said({ place, message: outcome.remark ?? draftMessages.rated() });
	},
	write: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'draft.write');
		const form = await superValidate(request, zod4(textBlockForm));
		const { block, text } = form.data;
		if (!form.valid)
			return refuse(400, { place: block, message: firstError(form.errors), typed: { text } });
		const outcome = await writeText(locals, { ...params, ...form.data, by: person.id });
		if (outcome.status === 'refused')
			return refuse(409, { place: block, message: outcome.message, typed: { text } });
		if (outcome.status === 'conflict')
			return refuse(409, {
				place: block,
				message: outcome.message,
				typed: { text: outcome.yours, rowVersion: String(outcome.rowVersion) },
				theirs: outcome.theirs
			});
		return said({ place: block, message: draftMessages.written() });
	},
	submit: async ({ locals, params }) => {
		const person = requirePermission(locals, 'revision.submit');
		const outcome = await submitRevision(locals, { ...params, by: person.id });
		if (outcome.status === 'refused')
			return refuse(409, { message: draftMessages.notSubmitted(), problems: outcome.problems });
		const own = `/products/${encodeURIComponent(params.partNumber)}`;
		redirect(303, `${own}/revisions/${outcome.revision.number}`);
	}
};

/** The first error of a form that a person can have made; the shape of the others is ours. */
function firstError(errors: Readonly<Record<string, unknown>>): string {
	const first = Object.values(errors)
		.flat()
		.find((entry) => typeof entry === 'string');
	return first ?? draftMessages.formUnread();
}
