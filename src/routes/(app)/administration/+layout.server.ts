import { requirePermission } from '$lib/server/auth/requirePermission';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = ({ locals }) => {
	requirePermission(locals, 'people.manage');
	return {};
};
