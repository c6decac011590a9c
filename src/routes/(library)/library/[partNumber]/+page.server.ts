import { error } from '@sveltejs/kit';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { versionText } from '$lib/core/datasheet/record';
import { notInLibrary } from '$lib/core/messages/publish';
import { releasesOn } from '$lib/core/review/settleReleases';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { findReleaseById } from '$lib/server/db/findRelease';
import { listReleases } from '$lib/server/db/listReleases';
import { mayReadLibrary } from '$lib/server/services/mayReadLibrary';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params }) => {
	const access = await mayReadLibrary(locals.db, locals.person);
	if (!access.isAllowed) requirePermission(locals, 'release.read');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	const today = new Date().toISOString().slice(0, 10);
	const releases = product
		? releasesOn(await listReleases(locals.db, product.id), today).filter(
				({ state }) => access.isReader || state !== 'withdrawn'
			)
		: [];
	if (releases.length === 0) error(404, notInLibrary(params.partNumber));

	const current = releases.find(({ state }) => state === 'current');
	const stored = current && (await findReleaseById(locals.db, current.id));
	const document = stored && readDocument(stored.document);
	return {
		partNumber: params.partNumber,
		current: current && {
			version: versionText(current),
			effectiveFrom: current.effectiveFrom,
			sha256: current.sha256,
			files: current.files
		},
		datasheet: document && {
			className: document.className,
			package: document.package,
			description: document.description,
			status: document.status,
			basisNotes: document.basisNotes,
			ratings: document.sections.flatMap((section) =>
				section.kind === 'ratings' ? section.rows : []
			),
			tables: document.sections.filter((section) => section.kind === 'capacitance-table')
		},
		releases: releases.map((release) => ({
			version: versionText(release),
			state: release.state,
			effectiveFrom: release.effectiveFrom,
			changes:
				release.record.history.find((line) => versionText(line.version) === versionText(release))
					?.changes ?? ''
		}))
	};
};
