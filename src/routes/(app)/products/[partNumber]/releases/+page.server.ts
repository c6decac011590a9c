import { error, fail, redirect } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { compareDocuments } from '$lib/core/datasheet/compareDocuments';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { versionText } from '$lib/core/datasheet/record';
import { releaseNotFound } from '$lib/core/messages/publish';
import { productNotFound } from '$lib/core/messages/review';
import { isPermitted } from '$lib/core/review/permissions';
import { releasesOn } from '$lib/core/review/settleReleases';
import { publishWithdrawalForm } from '$lib/forms/publishWithdrawal';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findOpenRevision } from '$lib/server/db/findOpenRevision';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { findRelease } from '$lib/server/db/findRelease';
import { listReleases } from '$lib/server/db/listReleases';
import { listRevisions } from '$lib/server/db/listRevisions';
import { reinstateRelease, withdrawRelease } from '$lib/server/services/withdrawRelease';
import type { Actions, PageServerLoad } from './$types';

async function comparison(
	{ db }: App.Locals,
	partNumber: string,
	before: string | null,
	after: string | null
) {
	if (before === null || after === null) return null;
	const older = await findRelease(db, partNumber, before);
	const newer = await findRelease(db, partNumber, after);
	if (older === undefined || newer === undefined)
		return { status: 'absent' as const, before, after };
	const changes = compareDocuments(readDocument(older.document), readDocument(newer.document));
	return { status: 'compared' as const, before, after, changes };
}

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	const person = requirePermission(locals, 'release.read');
	depends('platen:data');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, productNotFound(params.partNumber));
	const today = new Date().toISOString().slice(0, 10);
	const releases = releasesOn(await listReleases(locals.db, product.id), today);
	const open = await findOpenRevision(locals.db, product.id);
	return {
		releases: releases.map(({ record, ...release }) => ({
			id: release.id,
			version: versionText(release),
			state: release.state,
			effectiveFrom: release.effectiveFrom,
			publishedAt: release.publishedAt,
			publishedBy: release.publishedByName,
			revisionNumber: release.revisionNumber,
			sha256: release.sha256,
			files: release.files,
			changes:
				record.history.find((line) => versionText(line.version) === versionText(release))
					?.changes ?? ''
		})),
		revisions: isPermitted(person.roles, 'revision.read')
			? await listRevisions(locals.db, product.id)
			: [],
		approved: open?.state === 'approved' ? open : null,
		canPublish: isPermitted(person.roles, 'release.publish'),
		comparison: await comparison(
			locals,
			params.partNumber,
			url.searchParams.get('before'),
			url.searchParams.get('after')
		),
		withdrawing: url.searchParams.get('withdraw'),
		reinstating: url.searchParams.get('reinstate')
	};
};

export const actions: Actions = {
	withdrawal: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'release.publish');
		const form = await superValidate(request, zod4(publishWithdrawalForm));
		if (!form.valid) return fail(400, { message: form.errors.reason?.[0] ?? 'Say why.', form });
		const release = await findRelease(locals.db, params.partNumber, form.data.version);
		if (release === undefined) error(404, releaseNotFound(params.partNumber, form.data.version));
		const change = form.data.event === 'withdraw' ? withdrawRelease : reinstateRelease;
		const outcome = await change(locals, {
			release: release.id,
			reason: form.data.reason,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { message: outcome.message, form });
		redirect(303, `/products/${params.partNumber}/releases`);
	}
};
