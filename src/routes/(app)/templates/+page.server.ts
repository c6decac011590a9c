import { requirePermission } from '$lib/server/auth/requirePermission';
import { listTemplates } from '$lib/server/db/findTemplates';
import { listTemplateUses } from '$lib/server/db/listTemplateUses';
import { CLASS_NAMES } from '$lib/core/template/template';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, depends }) => {
	requirePermission(locals, 'template.read');
	depends('platen:data');
	const templates = await listTemplates(locals.db);
	return {
		templates: await Promise.all(
			templates.map(async ({ key, number, createdAt, template }) => ({
				key,
				number,
				name: template.name,
				className: CLASS_NAMES[template.productClass],
				sections: template.sections.length,
				date: createdAt.slice(0, 10),
				uses: (await listTemplateUses(locals.db, key)).map(({ partNumber }) => partNumber)
			}))
		)
	};
};
