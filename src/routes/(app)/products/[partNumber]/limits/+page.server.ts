import { error } from '@sveltejs/kit';
import { derivationOf, shownSide } from '$lib/components/limits/derivationOf';
import { limitsGridRow } from '$lib/components/limits/gridEvidence';
import { whatIfFields, type WhatIfCondition } from '$lib/components/limits/whatIfForm';
import { describePolicy, methodText } from '$lib/core/limits/describePolicy';
import { driftText } from '$lib/core/limits/driftText';
import { resolutionText } from '$lib/core/limits/resolutionText';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { limitsChoice } from '$lib/server/services/limitsChoice';
import type { LimitGroup } from '$lib/server/services/limitsOverview';
import { limitsProgress } from '$lib/server/services/limitsProgress';
import { limitsScreen, type LimitsScreen } from '$lib/server/services/limitsScreen';
import { trialOf } from './trialOf';
import type { PageServerLoad } from './$types';

const NOTHING: LimitsScreen = { groups: [], distributions: new Map(), lots: [] };

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	requirePermission(locals, 'limit.read');
	depends('platen:data');
	const { db } = locals;
	const product = await findProductByPartNumber(db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));

	const { policies, policy, basis } = await limitsChoice(db, url.searchParams);
	const { basisHash } = product;
	const screen =
		basisHash === null || policy === undefined
			? NOTHING
			: await limitsScreen(db, {
					product: product.id,
					basisHash,
					policyVersion: policy.id,
					declaredBasis: basis
				});

	const { groups, distributions, lots } = screen;
	const asked = url.searchParams.get('row');
	const row = groups.flatMap((of) => of.rows).find((of) => of.conditionKey === asked);
	const conditions = groups.flatMap(conditionsOf);
	const at = url.searchParams.get('at') ?? asked;
	const looked = conditions.find(({ key }) => key === at) ?? nearestToRoom(conditions);
	const stored = { lots, basis, at: looked?.key ?? '' };
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
		groups:
			policy === undefined
				? []
				: groups.map(({ temperatureCelsius, frequency, unit, rows }) => ({
						temperatureCelsius,
						frequency: frequency ?? null,
						unit,
						rows: rows.map((of) =>
							limitsGridRow(of, distributions.get(of.conditionKey), policy.rules)
						)
					})),
		trial:
			policy === undefined
				? null
				: {
						lots,
						conditions,
						fields: whatIfFields(url.searchParams, { ...stored, rules: policy.rules }),
						storedFields: whatIfFields(new URLSearchParams(), { ...stored, rules: policy.rules }),
						...(await trialOf(db, url.searchParams, {
							product,
							policy: policy.id,
							basis,
							at: looked
						}))
					},
		derivation:
			row === undefined || policy === undefined
				? null
				: derivationOf(
						row,
						shownSide(url.searchParams),
						policy,
						distributions.get(row.conditionKey)
					)
	};
};

function conditionsOf({ temperatureCelsius, frequency, rows }: LimitGroup): WhatIfCondition[] {
	return rows.map(({ conditionKey: key, condition }) => ({
		key,
		temperatureCelsius,
		frequency: frequency ?? null,
		bias: condition.reverseVoltage ?? 0
	}));
}

const ROOM = 25;

/** The middle bias of the temperature nearest to 25 °C: what a trial looks at first. */
function nearestToRoom(conditions: readonly WhatIfCondition[]): WhatIfCondition | undefined {
	const distance = (of: WhatIfCondition) => Math.abs(of.temperatureCelsius - ROOM);
	const least = Math.min(...conditions.map(distance));
	const nearest = conditions.filter((of) => distance(of) === least);
	return nearest[Math.floor(nearest.length / 2)];
}
