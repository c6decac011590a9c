import { error } from '@sveltejs/kit';
import { componentShares } from '$lib/components/cv/componentShares';
import { junctionOnPage } from '$lib/components/cv/junctionOnPage';
import { spreadIn } from '$lib/components/limits/derivationOf';
import { gridRow } from '$lib/components/limits/gridRow';
import { describePolicy } from '$lib/core/limits/describePolicy';
import { limitMessages } from '$lib/core/messages/limits';
import { readNumber } from '$lib/core/units/readNumber';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { chosenCurve } from '$lib/server/services/chosenCurve';
import { curveJunction } from '$lib/server/services/curveJunction';
import { limitsProgress } from '$lib/server/services/limitsProgress';
import type { PageServerLoad } from './$types';

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	requirePermission(locals, 'limit.read');
	depends('platen:data');
	const product = await findProductByPartNumber(locals.db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));

	const { choice, curve } = await chosenCurve(locals.db, product, url.searchParams);
	const { policies, policy, basis } = choice;
	const asked = readNumber(url.searchParams.get('bias') ?? '');
	const rows = curve?.rows ?? [];
	const selected =
		rows.find(({ limit }) => limit.condition.reverseVoltage === asked) ??
		rows[Math.floor(rows.length / 2)];
	return {
		progress: await limitsProgress(locals.db, product),
		choice: {
			policy: policy?.id ?? null,
			policyName: policy?.rules.name ?? '',
			basis,
			words: policy === undefined ? '' : describePolicy(policy.rules)
		},
		policies: policies.map(({ id, number, rules }) => ({ id, number, name: rules.name })),
		curve:
			curve === undefined
				? null
				: {
						conditions: curve.conditions.map(({ temperatureCelsius, frequency }) => ({
							temperatureCelsius,
							frequency: frequency ?? null
						})),
						temperatureCelsius: curve.temperatureCelsius,
						frequency: curve.frequency ?? null,
						unit: curve.unit,
						unitScale: curve.unitScale,
						rows: rows.map(({ limit, betweenPercent, withinPercent }) => ({
							...gridRow(limit),
							betweenPercent,
							withinPercent
						}))
					},
		selected:
			selected === undefined || curve === undefined
				? null
				: {
						row: gridRow(selected.limit),
						spread: spreadIn(selected.distribution, curve.unitScale),
						shares:
							selected.distribution.components === null
								? []
								: componentShares(selected.distribution.components)
					},
		junction:
			curve === undefined ? null : junctionOnPage(await curveJunction(locals.db, product, curve))
	};
};
