import { redirect } from '@sveltejs/kit';
import { requirePermission } from '$lib/server/auth/requirePermission';
import type { PageServerLoad } from './$types';

/** The day starts at the worklist. */
export const load: PageServerLoad = ({ locals }) => {
	requirePermission(locals, 'worklist.read');
	redirect(303, '/worklist');
};
