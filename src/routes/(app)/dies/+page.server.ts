import { isPermitted } from '$lib/core/review/permissions';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { listDies } from '$lib/server/db/listDies';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'product.read');
	return {
		dies: await listDies(locals.db),
		canEdit: isPermitted(person.roles, 'product.edit')
	};
};
