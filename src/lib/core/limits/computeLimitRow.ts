import type { Condition } from '../characteristics/condition';
import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import { inSi } from '../units/unit';
import type { Basis } from './basis';
import { fixed, pValue } from './digits';
import { engineVersion } from './engineVersion';
import { gateRefusals } from './gates';
import type { LimitRow, LimitValue } from './limit';
import { limitChain } from './limitChain';
import { limitSteps } from './limitSteps';
import { LOTS_DIFFER_BELOW, lotTest, type LotTest } from './lotTest';
import type { Margin, Side } from './methods/method';
import { METHODS } from './methods/methods';
import { DEFAULT_K } from './methods/sigma';
import type { LimitPolicy } from './policy';
import { sampleSteps } from './sampleSteps';
import { typicalValue } from './typicalValue';

export interface LimitRowOptions {
	readonly policyVersion: number;
	readonly condition: Condition;
	/** The unit of the table, and its size in SI. */
	readonly unit: string;
	readonly unitScale: number;
	readonly inputHash: string;
	/** Which limits are promised at once; both, unless said otherwise. */
	readonly sides?: readonly Side[];
	/** What the engineer says stands behind the limits; `characterized`, unless said otherwise. */
	readonly declaredBasis?: Basis;
	/** How the values are called in the derivation; `C`, unless said otherwise. */
	readonly symbol?: string;
}

/**
 * Minimum, typical and maximum at one condition, each with its derivation; or, where the data or
 * the method doesn't support them, the typical value alone with the reason.
 */
export function computeLimitRow(
	distribution: Distribution,
	rules: LimitPolicy,
	options: LimitRowOptions
): LimitRow {
	const { condition, unit, unitScale, sides = ['minimum', 'maximum'] } = options;
	const typical = typicalValue(distribution, rules, { condition, unit, unitScale });
	const limits = computeLimits(distribution, rules, options, sides, typical);
	const isPromised = limits.minimum !== null || limits.maximum !== null;
	return {
		characteristic: distribution.characteristic,
		condition,
		conditionKey: distribution.conditionKey,
		unit,
		unitScale,
		minimum: limits.minimum,
		typical,
		maximum: limits.maximum,
		basis: isPromised ? (options.declaredBasis ?? 'characterized') : 'typical',
		refusals: limits.refusals,
		warnings: [
			...limits.warnings,
			...(distribution.quarantined > 0
				? [limitMessages.quarantined(distribution.quarantined)]
				: []),
			...(distribution.uncertainty === null && isPromised
				? [limitMessages.uncertaintyNotStated()]
				: [])
		],
		sampleSize: distribution.sampleSize,
		independentLots: distribution.independentLots,
		policyVersion: options.policyVersion,
		inputHash: options.inputHash,
		engineVersion
	};
}

interface Limits {
	readonly minimum: LimitValue | null;
	readonly maximum: LimitValue | null;
	readonly refusals: string[];
	readonly warnings: string[];
}

const refused = (...refusals: string[]): Limits => ({
	minimum: null,
	maximum: null,
	refusals,
	warnings: []
});

function computeLimits(
	distribution: Distribution,
	rules: LimitPolicy,
	options: LimitRowOptions,
	sides: readonly Side[],
	typical: LimitValue
): Limits {
	const gates = gateRefusals(distribution, rules);
	const outcome = METHODS[rules.method]({ distribution, rules, sides });
	if (outcome.status === 'refused') return refused(outcome.message, ...gates);
	if (gates.length > 0) return refused(...gates);
	if (rules.method === 'sigma' && options.declaredBasis !== 'tested') {
		return refused(limitMessages.sigmaNeedsTest(rules.k ?? DEFAULT_K));
	}

	const lots = lotTest(distribution);
	const limitOn = (side: Side) =>
		sides.includes(side)
			? limitValue(distribution, rules, options, { side, margin: outcome.margin, lots })
			: null;
	const [minimum, maximum] = [limitOn('minimum'), limitOn('maximum')];

	if (minimum !== null && minimum.printed <= 0 && minimum.raw > 0) {
		return refused(limitMessages.nothingLeft());
	}
	if (
		(minimum !== null && minimum.raw > typical.raw) ||
		(maximum !== null && maximum.raw < typical.raw)
	) {
		return refused(limitMessages.medianOutside());
	}
	return {
		minimum,
		maximum,
		refusals: [],
		warnings: [
			...(lots !== undefined && lots.p < LOTS_DIFFER_BELOW
				? [limitMessages.lotsDiffer(lots.lots, lotRatio(lots), pValue(lots.p))]
				: []),
			...outcome.warnings,
			...(minimum?.text === typical.text ? [limitMessages.equalsTypical('minimum')] : []),
			...(maximum?.text === typical.text ? [limitMessages.equalsTypical('maximum')] : [])
		]
	};
}

function lotRatio({ F }: LotTest): string {
	return Number.isFinite(F) ? fixed(F, 2) : '∞';
}

function limitValue(
	distribution: Distribution,
	rules: LimitPolicy,
	{ condition, unit, unitScale, symbol = 'C' }: LimitRowOptions,
	{ side, margin, lots }: { side: Side; margin: Margin; lots: LotTest | undefined }
): LimitValue {
	const chain = limitChain({
		distribution,
		factor: margin.factor,
		side,
		rules,
		uncertainty: distribution.uncertainty ?? 0,
		unitScale
	});
	const tableUnit = { symbol: unit, scale: unitScale };
	return {
		raw: inSi(chain.raw, tableUnit),
		printed: inSi(chain.printed.value, tableUnit),
		text: chain.printed.text,
		derivation: [
			...sampleSteps(distribution, condition),
			...limitSteps({
				distribution,
				symbol,
				unit,
				unitScale,
				side,
				margin,
				rules,
				lots,
				chain
			})
		]
	};
}
