import { error } from '@sveltejs/kit';
import { policyNeed } from '$lib/core/limits/dataCoverage';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listPolicies } from '$lib/server/db/findPolicies';
import { limitsProgress } from '$lib/server/services/limitsProgress';
import { productCoverage } from '$lib/server/services/productCoverage';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, depends }) => {
	requirePermission(locals, 'limit.read');
	depends('platen:data');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));
	const coverage = await productCoverage(locals.db, product);
	const policies = await listPolicies(locals.db);
	return {
		progress: await limitsProgress(locals.db, product),
		coverage,
		policies: policies.map(({ id, number, rules }) => ({
			id,
			name: `${rules.name}, version ${number}`,
			needs: coverage.series.map((of) => policyNeed(rules, of))
		}))
	};
};
