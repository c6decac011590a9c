import { redirect } from '@sveltejs/kit';
import { requirePermission } from '$lib/server/auth/requirePermission';
import type { PageServerLoad } from './$types';

/** A product starts at its measurements. */
export const load: PageServerLoad = ({ locals, params }) => {
	requirePermission(locals, 'product.read');
	redirect(303, `/products/${encodeURIComponent(params.partNumber)}/measurements`);
};
