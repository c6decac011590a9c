import { error } from '@sveltejs/kit';
import {
	characteristicRow,
	type CharacteristicRows
} from '$lib/components/characteristics/characteristicRow';
import { derivationOf, shownSide, spreadIn } from '$lib/components/limits/derivationOf';
import { describePolicy } from '$lib/core/limits/describePolicy';
import { limitMessages } from '$lib/core/messages/limits';
import { requirePermission } from '$lib/server/auth/requirePermission';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import {
	characteristicsScreen,
	type CharacteristicGroup,
	type CharacteristicsScreen
} from '$lib/server/services/characteristicsScreen';
import { limitsChoice } from '$lib/server/services/limitsChoice';
import { limitsProgress } from '$lib/server/services/limitsProgress';
import type { PageServerLoad } from './$types';

const NOTHING: CharacteristicsScreen = { groups: [], families: [], leakage: [] };

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	requirePermission(locals, 'limit.read');
	depends('platen:data');
	const { db } = locals;
	const product = await findProductByPartNumber(db, params.partNumber);
	if (product === undefined) error(404, limitMessages.noSuchProduct(params.partNumber));

	const { policies, policy, basis } = await limitsChoice(db, url.searchParams);
	const { basisHash } = product;
	const { groups, families, leakage } =
		basisHash === null || policy === undefined
			? NOTHING
			: await characteristicsScreen(db, {
					product: product.id,
					basisHash,
					policyVersion: policy.id,
					declaredBasis: basis
				});
	const shown = chosenRow(groups, url.searchParams);
	return {
		progress: await limitsProgress(db, product),
		choice: {
			policy: policy?.id ?? null,
			basis,
			words: policy === undefined ? '' : describePolicy(policy.rules)
		},
		policies: policies.map(({ id, number, rules }) => ({ id, number, name: rules.name })),
		groups: groups.map(rowsOf),
		selected:
			shown === undefined
				? null
				: {
						characteristic: shown.group.characteristic.key,
						symbol: shown.group.characteristic.symbol,
						unit: shown.group.unit,
						row: characteristicRow(shown.row, shown.distribution),
						spread:
							shown.distribution === undefined
								? null
								: spreadIn(shown.distribution, shown.group.unitScale)
					},
		derivation:
			shown === undefined || policy === undefined || !url.searchParams.has('side')
				? null
				: derivationOf(shown.row, shownSide(url.searchParams), policy, shown.distribution),
		families,
		leakage
	};
};

function rowsOf({
	characteristic,
	unit,
	rows,
	distributions
}: CharacteristicGroup): CharacteristicRows {
	const { key, symbol, name, measuredAs } = characteristic;
	const stored = new Map(distributions.map(({ distribution: of }) => [of.conditionKey, of]));
	return {
		key,
		symbol,
		name,
		unit,
		isDerived: measuredAs === 'derived',
		rows: rows.map((row) => characteristicRow(row, stored.get(row.conditionKey)))
	};
}

/** The row the address names by `of` and `at`; the first one otherwise. */
function chosenRow(groups: readonly CharacteristicGroup[], search: URLSearchParams) {
	const group =
		groups.find(({ characteristic }) => characteristic.key === search.get('of')) ?? groups[0];
	const row = group?.rows.find((of) => of.conditionKey === search.get('at')) ?? group?.rows[0];
	if (group === undefined || row === undefined) return undefined;
	const found = group.distributions.find(
		({ distribution }) => distribution.conditionKey === row.conditionKey
	);
	return { group, row, distribution: found?.distribution };
}
