import { error } from '@sveltejs/kit';
import { CLASS_NAMES } from '$lib/core/template/template';
import { draftMessages } from '$lib/core/messages/datasheet';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listTemplateVersions } from '$lib/server/db/findTemplates';
import { listTemplateUses } from '$lib/server/db/listTemplateUses';
import { templateOutline } from './templateOutline';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	requirePermission(locals, 'template.read');
	depends('platen:data');
	const versions = await listTemplateVersions(locals.db, params.key);
	const wanted = Number(url.searchParams.get('version') ?? versions[0]?.number);
	const shown = versions.find(({ number }) => number === wanted);
	if (shown === undefined) error(404, draftMessages.templateUnknown(params.key));
	return {
		key: shown.key,
		number: shown.number,
		name: shown.template.name,
		className: CLASS_NAMES[shown.template.productClass],
		sources: shown.template.sources,
		hash: shown.hash,
		sections: templateOutline(shown.template),
		versions: versions.map(({ number, createdAt }) => ({ number, date: createdAt.slice(0, 10) })),
		uses: await listTemplateUses(locals.db, params.key)
	};
};
