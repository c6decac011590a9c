import { frequencyText, gridRow, SHOWN, signedText, type Shown } from './gridRow';
import type { Derivation } from './derivation';
import { limitFacts, withoutLotTexts } from './limitFacts';
import type { Spread } from './spreadFigure';
import { histogram } from '$lib/core/distributions/histogram';
import type { Distribution } from '$lib/core/distributions/summary';
import { describePolicy } from '$lib/core/limits/describePolicy';
import type { DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import type { LimitRow, LimitValue } from '$lib/core/limits/limit';
import type { PolicyVersion } from '$lib/core/limits/policy';
import { spreadByLot } from '$lib/core/limits/spreadByLot';

const BARS = 28;

/** The number an address asks the derivation of: `minimum`, unless it says otherwise. */
export function shownSide(search: URLSearchParams): Shown {
	return SHOWN.find((known) => known === search.get('side')) ?? 'minimum';
}

/** What the sheet of one number shows. */
export function derivationOf(
	row: LimitRow,
	shown: Shown,
	policy: PolicyVersion,
	distribution: Distribution | undefined,
	decided?: DecidedLimit
): Derivation {
	const { temperatureCelsius, frequency } = row.condition;
	const number = (value: LimitValue | null) => (value === null ? null : Number(value.text));
	return {
		shown,
		row: gridRow(row),
		value: row[shown],
		unit: row.unit,
		conditionText: [
			`${signedText(temperatureCelsius)}\u00a0°C`,
			...(frequency === undefined ? [] : [frequencyText(frequency)])
		].join(', '),
		policyText: `${policy.rules.name}, version ${policy.number}. ${describePolicy(policy.rules)}`,
		trace: row.inputHash.slice(0, 16),
		engineVersion: row.engineVersion,
		limits: {
			minimum: number(row.minimum),
			typical: number(row.typical),
			maximum: number(row.maximum)
		},
		spread: distribution === undefined ? null : spreadIn(distribution, row.unitScale),
		facts: distribution === undefined ? [] : limitFacts(row, policy.rules, distribution, decided),
		withoutLots:
			distribution === undefined || shown === 'typical' || decided !== undefined
				? []
				: withoutLotTexts(row, shown, policy.rules, distribution),
		testYield: row.testYield ?? null
	};
}

/** The stored sums of a distribution as figures draw them. */
export function spreadIn(distribution: Distribution, unitScale: number): Spread {
	const quantiles = distribution.quantiles.map(({ probability, value }) => ({
		probability,
		value: value / unitScale
	}));
	return { ...spreadByLot(distribution, unitScale), bars: histogram(quantiles, BARS) };
}
