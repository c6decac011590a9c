import { histogram } from '$lib/core/distributions/histogram';
import { independentLots } from '$lib/core/limits/independentLots';
import type { LimitRow, LimitValue } from '$lib/core/limits/limit';
import { spreadByLot } from '$lib/core/limits/spreadByLot';
import { compareLimits, countDifferences } from '$lib/core/limits/whatIf/compareLimits';
import type {
	PrintedLimits,
	WhatIfAnswer,
	WhatIfAnswerRow,
	WhatIfFigure
} from '$lib/core/limits/whatIf/whatIfAnswer';
import type { WhatIfRequest } from '$lib/core/limits/whatIf/whatIfRequest';
import { whatIfRow, type WhatIfRow } from '$lib/core/limits/whatIf/whatIfRow';
import { whatIfRules } from '$lib/core/limits/whatIf/whatIfRules';
import { limitMessages } from '$lib/core/messages/limits';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import type { Connection } from '../db/database';
import type { StoredDistribution } from '../db/findDistributions';
import { findPolicyVersion, listPolicies } from '../db/findPolicies';
import { capacitanceTable } from './capacitanceTable';

const BARS = 28;

export type WhatIfOutcome =
	| { readonly status: 'answered'; readonly answer: WhatIfAnswer }
	| { readonly status: 'refused'; readonly parameter: string; readonly message: string };

/**
 * The limits of one temperature as they would be by other rules or without some lots, beside the
 * stored ones. All from stored sums; nothing is written.
 */
export async function whatIf(
	db: Connection,
	product: { readonly id: number; readonly basisHash: string | null },
	asked: WhatIfRequest
): Promise<WhatIfOutcome> {
	if (product.basisHash === null) return refuse('product', limitMessages.noDistributions());
	const policy =
		asked.policy === undefined
			? (await listPolicies(db))[0]
			: await findPolicyVersion(db, asked.policy);
	if (policy === undefined) return refuse('policy', limitMessages.noSuchPolicy(asked.policy));

	const { temperatureCelsius } = asked;
	const table = await capacitanceTable(db, {
		product: product.id,
		temperatureCelsius,
		frequency: asked.frequency,
		policyVersion: policy.id,
		declaredBasis: asked.basis,
		isKept: false
	});
	if ('status' in table) return refuse(table.parameter, table.message);
	const { unit, unitScale, frequency, rows: stored, distributions } = table;
	const byKey = new Map(distributions.map((of) => [of.distribution.conditionKey, of]));
	const rules = whatIfRules(policy.rules, asked.basis ?? 'characterized', asked.change);
	const { lots } = asked.change;
	const rows = stored.flatMap((row): WhatIfAnswerRow[] => {
		const of = byKey.get(row.conditionKey);
		if (of === undefined) return [];
		const { condition, distribution } = of;
		const options = { condition, unit, unitScale, policyVersion: policy.id, lots };
		return [compared(row, whatIfRow(distribution, rules, options))];
	});
	const shown = asked.at === undefined ? undefined : byKey.get(asked.at);
	return {
		status: 'answered',
		answer: {
			policy: { id: policy.id, name: policy.rules.name, number: policy.number },
			unit,
			temperatureCelsius,
			frequency: frequency ?? null,
			lotsOut: lotsOut(distributions, lots),
			counts: countDifferences(rows.flatMap(({ minimum, maximum }) => [minimum, maximum])),
			notes: policy.rules.span === 'whole-curve' ? [limitsScreenMessages.eachBiasOnly()] : [],
			rows,
			figure: shown === undefined ? null : figureOf(shown, unitScale)
		}
	};
}

function refuse(parameter: string, message: string): WhatIfOutcome {
	return { status: 'refused', parameter, message };
}

function compared(stored: LimitRow, tried: WhatIfRow): WhatIfAnswerRow {
	const row = tried.status === 'computed' ? tried.row : undefined;
	return {
		key: stored.conditionKey,
		bias: stored.condition.reverseVoltage ?? 0,
		stored: printed(stored),
		tried: row === undefined ? NOTHING : printed(row),
		minimum: compareLimits('minimum', stored.minimum, row?.minimum ?? null),
		maximum: compareLimits('maximum', stored.maximum, row?.maximum ?? null),
		sampleSize: row?.sampleSize ?? 0,
		independentLots: row?.independentLots ?? 0,
		refusals: tried.status === 'computed' ? tried.row.refusals : [tried.message],
		warnings: row?.warnings ?? [],
		requiredSampleSize: row?.requiredSampleSize ?? null
	};
}

const NOTHING: PrintedLimits = { minimum: null, typical: null, maximum: null };

function printed({ minimum, typical, maximum, testYield }: LimitRow): PrintedLimits {
	const text = (value: LimitValue | null) => value?.text ?? null;
	const test = { minimum: minimum?.test?.text ?? null, maximum: maximum?.test?.text ?? null };
	return {
		minimum: text(minimum),
		typical: text(typical),
		maximum: text(maximum),
		...(test.minimum === null && test.maximum === null ? {} : { test }),
		...(testYield === undefined ? {} : { testYield })
	};
}

function lotsOut(
	distributions: readonly StoredDistribution[],
	lots: readonly string[] | undefined
): string[] {
	if (lots === undefined) return [];
	const names = distributions.flatMap(({ distribution }) =>
		independentLots(distribution).map(({ name }) => name)
	);
	return [...new Set(names)].filter((name) => !lots.includes(name)).sort();
}

function figureOf({ distribution }: StoredDistribution, unitScale: number): WhatIfFigure {
	const quantiles = distribution.quantiles.map(({ probability, value }) => ({
		probability,
		value: value / unitScale
	}));
	return {
		key: distribution.conditionKey,
		...spreadByLot(distribution, unitScale),
		bars: histogram(quantiles, BARS)
	};
}
