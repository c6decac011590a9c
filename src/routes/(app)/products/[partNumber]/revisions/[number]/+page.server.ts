import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { revisionNotFound } from '$lib/core/messages/review';
import { mayDecide, mayPublish, mayVerify } from '$lib/core/review/separation';
import { nextRevisionState } from '$lib/core/review/states';
import { reviewCommentForm } from '$lib/forms/reviewComment';
import { reviewDecisionForm } from '$lib/forms/reviewDecision';
import { reviewRowForm } from '$lib/forms/reviewRow';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findHands } from '$lib/server/db/findHands';
import { findNewestJob } from '$lib/server/db/findNewestJob';
import { findReleaseOfRevision } from '$lib/server/db/findRelease';
import { findRevision } from '$lib/server/db/findRevision';
import { listComments } from '$lib/server/db/listComments';
import { listDecisions } from '$lib/server/db/listDecisions';
import { listVerificationRows } from '$lib/server/db/listVerificationRows';
import { commentOnRow } from '$lib/server/services/commentOnRow';
import { decideRevision } from '$lib/server/services/decideRevision';
import { tickLowRisk, verifyRow } from '$lib/server/services/verifyRow';
import type { Actions, PageServerLoad } from './$types';

interface Place {
	readonly partNumber: string;
	readonly number: string;
}

async function revisionAt(locals: App.Locals, { partNumber, number }: Place) {
	const wanted = /^\d{1,9}$/.test(number) ? Number(number) : 0;
	const revision = await findRevision(locals.db, partNumber, wanted);
	if (revision === undefined) error(404, revisionNotFound(partNumber, wanted));
	return revision;
}

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	const person = requirePermission(locals, 'revision.read');
	depends('platen:data');
	const revision = await revisionAt(locals, params);
	const rows = await listVerificationRows(locals.db, revision.id);
	const comments = await listComments(locals.db, revision.id);
	const hands = await findHands(locals.db, revision);
	const release = await findReleaseOfRevision(locals.db, revision.id);
	const job = rows.some(({ evidence }) => evidence.risk === 'pending')
		? await findNewestJob(locals.db, `verify-evidence:${revision.id}`)
		: undefined;
	return {
		revision: {
			number: revision.number,
			partNumber: revision.partNumber,
			state: revision.state,
			sha256: revision.sha256,
			submittedBy: revision.submittedByName,
			submittedAt: revision.submittedAt
		},
		rows: rows.map(({ row, state, at, byName, evidence }) => ({
			row,
			state,
			at,
			byName,
			evidence,
			comments: comments.filter((comment) => comment.row === row).length
		})),
		comments,
		decisions: await listDecisions(locals.db, revision.id),
		release: release && { version: `${release.major}.${release.minor}` },
		job: job && { state: job.state, progress: job.progress, error: job.error },
		mayVerify: mayVerify(person, hands),
		mayDecide: mayDecide(person, hands),
		mayPublish: mayPublish(person, hands),
		canReturn: nextRevisionState(revision.state, 'return') !== undefined,
		selected: url.searchParams.get('row'),
		panel: url.searchParams.get('panel')
	};
};

export const actions: Actions = {
	verify: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'revision.verify');
		const revision = await revisionAt(locals, params);
		const form = await superValidate(request, zod4(reviewRowForm));
		if (!form.valid) return fail(400, { message: 'Choose a row and what you found.', form });
		const outcome = await verifyRow(locals, {
			...form.data,
			revision: revision.id,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { message: outcome.message, form });
		return { message: undefined };
	},
	tickLowRisk: async ({ locals, params }) => {
		const person = requirePermission(locals, 'revision.verify');
		const revision = await revisionAt(locals, params);
		const outcome = await tickLowRisk(locals, { revision: revision.id, by: person.id });
		if (outcome.status === 'refused') return fail(409, { message: outcome.message });
		return { message: undefined };
	},
	comment: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'revision.comment');
		const revision = await revisionAt(locals, params);
		const form = await superValidate(request, zod4(reviewCommentForm));
		if (!form.valid)
			return fail(400, { message: form.errors.text?.[0] ?? 'Write a comment.', form });
		const outcome = await commentOnRow(locals, {
			revision: revision.id,
			row: form.data.row === '' ? null : form.data.row,
			text: form.data.text,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { message: outcome.message, form });
		return { message: undefined };
	},
	decide: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'revision.approve');
		const revision = await revisionAt(locals, params);
		const form = await superValidate(request, zod4(reviewDecisionForm));
		if (!form.valid) return fail(400, { message: 'Approve or return the revision.', form });
		const outcome = await decideRevision(locals, {
			...form.data,
			revision: revision.id,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { message: outcome.message, form });
		redirect(303, `/products/${params.partNumber}/revisions/${revision.number}`);
	}
};
