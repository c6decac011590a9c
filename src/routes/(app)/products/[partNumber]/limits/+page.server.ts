import { error } from '@sveltejs/kit';
import { derivationOf, shownSide } from '$lib/components/limits/derivationOf';
import { gridRow } from '$lib/components/limits/gridRow';
import { describePolicy, methodText } from '$lib/core/limits/describePolicy';
import { driftText } from '$lib/core/limits/driftText';
import { resolutionText } from '$lib/core/limits/resolutionText';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findDistribution } from '$lib/server/db/findDistribution';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { limitsChoice } from '$lib/server/services/limitsChoice';
import { limitsOverview } from '$lib/server/services/limitsOverview';
import { limitsProgress } from '$lib/server/services/limitsProgress';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	requirePermission(locals, 'limit.read');
	depends('platen:data');
	const { db } = locals;
	const product = await findProductByPartNumber(db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));

	const { policies, policy, basis } = await limitsChoice(db, url.searchParams);
	const { basisHash } = product;
	const groups =
		basisHash === null || policy === undefined
			? []
			: await limitsOverview(db, {
					product: product.id,
					basisHash,
					policyVersion: policy.id,
					declaredBasis: basis
				});

	const asked = url.searchParams.get('row');
	const row = groups.flatMap((of) => of.rows).find((of) => of.conditionKey === asked);
	const distribution =
		row === undefined || basisHash === null
			? undefined
			: await findDistribution(db, { ...row, product: product.id, basisHash });
	return {
		progress: await limitsProgress(db, product),
		choice: {
			policy: policy?.id ?? null,
			policyName: policy?.rules.name ?? '',
			basis,
			words: policy === undefined ? '' : describePolicy(policy.rules)
		},
		policies: policies.map(({ id, number, rules }) => ({
			id,
			number,
			name: rules.name,
			method: rules.method,
			promise: methodText(rules),
			minimumLots: rules.minimumLots,
			minimumDevices: rules.minimumDevices,
			drift: driftText(rules.drift),
			resolution: resolutionText(rules.resolution, 'units')
		})),
		groups: groups.map(({ temperatureCelsius, frequency, unit, rows }) => ({
			temperatureCelsius,
			frequency: frequency ?? null,
			unit,
			rows: rows.map(gridRow)
		})),
		derivation:
			row === undefined || policy === undefined
				? null
				: derivationOf(row, shownSide(url.searchParams), policy, distribution)
	};
};
