import { versionText } from '$lib/core/datasheet/record';
import { CLASS_NAMES, productClass } from '$lib/core/template/template';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listPublished } from '$lib/server/db/listPublished';
import { mayReadLibrary } from '$lib/server/services/mayReadLibrary';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, url }) => {
	const access = await mayReadLibrary(locals.db, locals.person);
	if (!access.isAllowed) requirePermission(locals, 'release.read');
	const today = new Date().toISOString().slice(0, 10);
	const search = url.searchParams.get('search')?.trim() ?? '';
	const needle = search.toLowerCase();
	const current = (await listPublished(locals.db, today)).filter(
		({ state }) => state === 'current'
	);
	const entries = current.map((release) => ({
		partNumber: release.partNumber,
		className: CLASS_NAMES[productClass.parse(release.productClass)],
		package: release.package,
		description: release.description,
		version: versionText(release),
		effectiveFrom: release.effectiveFrom
	}));
	return {
		search,
		total: entries.length,
		entries: entries.filter((entry) =>
			[entry.partNumber, entry.className, entry.package, entry.description]
				.join(' ')
				.toLowerCase()
				.includes(needle)
		)
	};
};
