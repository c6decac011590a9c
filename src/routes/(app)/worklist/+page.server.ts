import { worklistMessages } from '$lib/core/messages/worklist';
import { isPermitted } from '$lib/core/review/permissions';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { countWaiting, gatherWorklist, oldestSince } from '$lib/server/services/gatherWorklist';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, depends }) => {
	depends('platen:data');
	const person = requirePermission(locals, 'worklist.read');
	const groups = await gatherWorklist(locals.db, person, new Date().toISOString());
	const oldest = oldestSince(groups);
	return {
		groups,
		summary:
			oldest === undefined
				? worklistMessages.nothing()
				: worklistMessages.summary(countWaiting(groups), oldest.slice(0, 10)),
		expected: worklistMessages.expected({
			giveVerdicts: isPermitted(person.roles, 'verdict.give'),
			verify: isPermitted(person.roles, 'revision.verify'),
			publish: isPermitted(person.roles, 'release.publish')
		}),
		canReadProducts: isPermitted(person.roles, 'product.read')
	};
};
