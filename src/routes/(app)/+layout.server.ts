import { ROLE_NAMES } from '$lib/core/review/permissions';
import { placesFor } from '$lib/core/review/places';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { countWaiting, gatherWorklist } from '$lib/server/services/gatherWorklist';
import type { LayoutServerLoad } from './$types';

export const load: LayoutServerLoad = async ({ locals, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'worklist.read');
	const worklist = await gatherWorklist(locals.db, person, new Date().toISOString());
	return {
		person: { name: person.name, roles: person.roles.map((role) => ROLE_NAMES[role]) },
		places: placesFor(person.roles),
		waiting: countWaiting(worklist)
	};
};
