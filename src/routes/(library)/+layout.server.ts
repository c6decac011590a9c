import { ROLE_NAMES } from '$lib/core/review/permissions';
import { placesFor, type Place } from '$lib/core/review/places';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findOrganization } from '$lib/server/db/findOrganization';
import { mayReadLibrary } from '$lib/server/services/mayReadLibrary';
import { countWaiting, gatherWorklist } from '$lib/server/services/gatherWorklist';
import type { LayoutServerLoad } from './$types';

/** Everyone reads the library when the organization says so; else whoever may read releases. */
export const load: LayoutServerLoad = async ({ locals }) => {
	const access = await mayReadLibrary(locals.db, locals.person);
	const person = access.isAllowed ? locals.person : requirePermission(locals, 'release.read');
	const visitor: Place[] = [{ href: '/library', label: 'Library' }];
	return {
		organization: (await findOrganization(locals.db)).name,
		person: person && {
			name: person.name,
			roles: person.roles.map((role) => ROLE_NAMES[role])
		},
		places: person ? placesFor(person.roles) : visitor,
		waiting: person
			? countWaiting(await gatherWorklist(locals.db, person, new Date().toISOString()))
			: 0
	};
};
