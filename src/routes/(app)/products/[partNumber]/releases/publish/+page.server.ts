import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { versionText } from '$lib/core/datasheet/record';
import { productNotFound } from '$lib/core/messages/review';
import { mayPublish } from '$lib/core/review/separation';
import { publishReleaseForm } from '$lib/forms/publishRelease';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findHands } from '$lib/server/db/findHands';
import { findNewestJob } from '$lib/server/db/findNewestJob';
import { findOpenRevision } from '$lib/server/db/findOpenRevision';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { findRevisionById } from '$lib/server/db/findRevision';
import { proposeRelease } from '$lib/server/services/proposeRelease';
import { publishKey } from '$lib/server/services/publishKey';
import { publishRelease } from '$lib/server/services/publishRelease';
import type { Actions, PageServerLoad } from './$types';

/** The approved revision of a product, or `undefined` where none waits to be published. */
async function approvedRevision({ db }: App.Locals, partNumber: string) {
	const product = await findProductByPartNumber(db, partNumber);
	if (product === undefined) error(404, productNotFound(partNumber));
	const open = await findOpenRevision(db, product.id);
	return open?.state === 'approved' ? findRevisionById(db, open.id) : undefined;
}

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	const person = requirePermission(locals, 'release.publish');
	depends('platen:data');
	const revision = await approvedRevision(locals, params.partNumber);
	const today = new Date().toISOString().slice(0, 10);
	if (revision === undefined) {
		// The job has done it meanwhile: the release is in the list.
		if (url.searchParams.has('job')) redirect(303, `/products/${params.partNumber}/releases`);
		return { waiting: null, form: await superValidate(zod4(publishReleaseForm)) };
	}

	const proposal = await proposeRelease(locals.db, revision);
	const version = versionText(proposal.version);
	const job = await findNewestJob(locals.db, publishKey(revision.id));
	return {
		waiting: {
			number: revision.number,
			sha256: revision.sha256,
			version,
			previous: proposal.previous && versionText(proposal.previous.version),
			changes: proposal.changes,
			today,
			job: job && { state: job.state, progress: job.progress, error: job.error },
			allowance: mayPublish(person, await findHands(locals.db, revision))
		},
		form: await superValidate(
			{ effectiveFrom: today, version, summary: proposal.summary },
			zod4(publishReleaseForm)
		)
	};
};

export const actions: Actions = {
	default: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'release.publish');
		const form = await superValidate(request, zod4(publishReleaseForm));
		if (!form.valid) return fail(400, { form, message: undefined });
		const revision = await approvedRevision(locals, params.partNumber);
		if (revision === undefined)
			return fail(409, { form, message: 'No approved revision waits to be published.' });
		const outcome = await publishRelease(locals, {
			...form.data,
			revision: revision.id,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { form, message: outcome.message });
		redirect(303, `/products/${params.partNumber}/releases/publish?job=${outcome.job}`);
	}
};
