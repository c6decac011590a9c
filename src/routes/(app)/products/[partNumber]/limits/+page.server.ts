import { error, fail } from '@sveltejs/kit';
import { superValidate } from 'sveltekit-superforms';
import { zod as zod4 } from 'superforms-zod';
import { derivationOf, shownSide } from '$lib/components/limits/derivationOf';
import { limitsGridRow } from '$lib/components/limits/gridEvidence';
import { whatIfFields, type WhatIfCondition } from '$lib/components/limits/whatIfForm';
import { describePolicy, methodText } from '$lib/core/limits/describePolicy';
import type { DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import { driftText } from '$lib/core/limits/driftText';
import { resolutionText } from '$lib/core/limits/resolutionText';
import type { LimitRow } from '$lib/core/limits/limit';
import { readNumber } from '$lib/core/units/readNumber';
import { draftMessages } from '$lib/core/messages/datasheet';
import { limitMessages } from '$lib/core/messages/limits';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import { isPermitted } from '$lib/core/review/permissions';
import { limitDecisionForm, limitTakeBackForm } from '$lib/forms/limitDecision';
import { requirePermission } from '$lib/server/auth/requirePermission';
import type { Connection } from '$lib/server/db/database';
import { findDraftPolicy } from '$lib/server/db/findDraftPolicy';
import { findPolicyVersion, type StoredPolicy } from '$lib/server/db/findPolicies';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { decideLimit, takeBackDecision } from '$lib/server/services/decideLimit';
import { limitsChoice } from '$lib/server/services/limitsChoice';
import type { LimitGroup } from '$lib/server/services/limitsOverview';
import { limitsProgress } from '$lib/server/services/limitsProgress';
import { limitsScreen, type LimitsScreen } from '$lib/server/services/limitsScreen';
import { trialOf } from './trialOf';
import type { Actions, PageServerLoad } from './$types';

const NOTHING: LimitsScreen = {
	groups: [],
	distributions: new Map(),
	decided: new Map(),
	lots: []
};

export const load: PageServerLoad = async ({ locals, params, url, depends }) => {
	const person = requirePermission(locals, 'limit.read');
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
					declaredBasis: basis,
					rules: policy.rules
				});

	const { groups, distributions, decided, lots } = screen;
	const asked = url.searchParams.get('row');
	const row = groups.flatMap((of) => of.rows).find((of) => of.conditionKey === asked);
	const conditions = groups.flatMap(conditionsOf);
	const at = url.searchParams.get('at') ?? asked;
	const looked = conditions.find(({ key }) => key === at) ?? nearestToRoom(conditions);
	const stored = { lots, basis, at: looked?.key ?? '' };
	return {
		/** Changes with what was asked, and stays over live updates. */
		address: url.search,
		progress: await limitsProgress(db, product),
		choice: {
			policy: policy?.id ?? null,
			policyName: policy?.rules.name ?? '',
			basis,
			words: policy === undefined ? '' : describePolicy(policy.rules),
			older: olderText(policy, policies)
		},
		draftPolicy: await draftPolicyText(db, product.id, policies),
		policies: withChosen(policies, policy).map(({ id, number, rules }) => ({
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
							limitsGridRow(
								of,
								distributions.get(of.conditionKey),
								policy.rules,
								decided.get(of.conditionKey)
							)
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
						distributions.get(row.conditionKey),
						decided.get(row.conditionKey)
					),
		decision: decisionOf(row, {
			decided: decided.get(row?.conditionKey ?? ''),
			mayDecide: isPermitted(person.roles, 'limit.decide'),
			isOpen: url.searchParams.has('decide')
		})
	};
};

/** The newest versions, and the chosen one where it is older. */
function withChosen(policies: readonly StoredPolicy[], chosen: StoredPolicy | undefined) {
	return chosen === undefined || policies.some(({ id }) => id === chosen.id)
		? policies
		: [...policies, chosen];
}

/** Says that a version isn't the newest of its policy; `null` where it is. */
function olderText(
	used: StoredPolicy | undefined,
	policies: readonly StoredPolicy[]
): string | null {
	const newest = policies.find(({ policy }) => policy === used?.policy);
	return used === undefined || newest === undefined || newest.id === used.id
		? null
		: limitsScreenMessages.olderPolicy(newest.rules.name, used.number, newest.number);
}

/** The same of the policy that the product's draft binds by. */
async function draftPolicyText(
	db: Connection,
	product: number,
	policies: readonly StoredPolicy[]
): Promise<{ readonly id: number; readonly text: string } | null> {
	const bindsBy = await findDraftPolicy(db, product);
	if (bindsBy === undefined) return null;
	const used = await findPolicyVersion(db, bindsBy);
	const text = olderText(used, policies);
	return used === undefined || text === null ? null : { id: used.id, text };
}

const digits = (text: string) => (text === '' ? null : text);

export const actions: Actions = {
	decide: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'limit.decide');
		const form = await superValidate(request, zod4(limitDecisionForm));
		const { testerUncertainty, minimum, maximum, ...rest } = form.data;
		const values = form.data;
		if (!form.valid) return fail(400, { message: draftMessages.formUnread(), values });
		const uncertainty = testerUncertainty === '' ? null : readNumber(testerUncertainty);
		if (uncertainty === undefined || (uncertainty !== null && uncertainty < 0)) {
			return fail(400, { message: limitsScreenMessages.uncertaintyUnread(), values });
		}
		const outcome = await decideLimit(locals, {
			...rest,
			partNumber: params.partNumber,
			minimum: digits(minimum),
			maximum: digits(maximum),
			testerUncertainty: uncertainty,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { message: outcome.message, values });
		return { done: limitsScreenMessages.decided() };
	},
	takeBack: async ({ locals, params, request }) => {
		const person = requirePermission(locals, 'limit.decide');
		const form = await superValidate(request, zod4(limitTakeBackForm));
		if (!form.valid) return fail(400, { message: draftMessages.formUnread() });
		const outcome = await takeBackDecision(locals, {
			...form.data,
			partNumber: params.partNumber,
			by: person.id
		});
		if (outcome.status === 'refused') return fail(409, { message: outcome.message });
		return { done: limitsScreenMessages.takenBack() };
	}
};

/** What the form beside a derivation starts from; `null` where nothing may be decided. */
function decisionOf(
	row: LimitRow | undefined,
	of: {
		readonly decided: DecidedLimit | undefined;
		readonly mayDecide: boolean;
		readonly isOpen: boolean;
	}
) {
	if (row === undefined || !of.mayDecide) return null;
	return {
		conditionKey: row.conditionKey,
		unit: row.unit,
		minimum: row.minimum?.text ?? '',
		maximum: row.maximum?.text ?? '',
		isDecided: of.decided !== undefined,
		isOpen: of.isOpen
	};
}

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
