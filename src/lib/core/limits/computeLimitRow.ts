import type { Condition } from '../characteristics/condition';
import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import type { Basis } from './basis';
import type { Allowance, Side } from './allowance';
import type { CurveWidening } from './curveWidening';
import { engineVersion } from './engineVersion';
import { gateRefusals } from './gates';
import type { LimitRow, LimitValue, TestYield } from './limit';
import { limitValueOn } from './limitValueOn';
import { lotTest } from './lotTest';
import { METHODS } from './methods/methods';
import { DEFAULT_K } from './methods/sigma';
import type { LimitPolicy } from './policy';
import { modelWarnings, sampleWarnings } from './rowWarnings';
import { statedUncertainty } from './statedUncertainty';
import { testYield } from './testYield';
import { typicalValue } from './typicalValue';
import { widen } from './widen';

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
	/** Systematic uncertainty; that of the sets, unless given. */
	readonly uncertainty?: Allowance;
	/** Factor of a whole-curve policy. */
	readonly widening?: CurveWidening | undefined;
	/** A what-if may see what the house rule gives; it is warned, and nothing is printed from it. */
	readonly allowsHouseRule?: boolean;
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
			...sampleWarnings(distribution, {
				isPromised,
				isUncertaintyStated: distribution.uncertainty !== null || options.uncertainty !== undefined
			})
		],
		...(limits.requiredSampleSize === undefined
			? {}
			: { requiredSampleSize: limits.requiredSampleSize }),
		...(limits.testYield === undefined ? {} : { testYield: limits.testYield }),
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
	readonly requiredSampleSize?: number | undefined;
	readonly testYield?: TestYield;
}

const refused = (refusals: string[], requiredSampleSize?: number): Limits => ({
	minimum: null,
	maximum: null,
	refusals,
	warnings: [],
	requiredSampleSize
});

function computeLimits(
	distribution: Distribution,
	rules: LimitPolicy,
	options: LimitRowOptions,
	sides: readonly Side[],
	typical: LimitValue
): Limits {
	const gates = gateRefusals(distribution, rules);
	const outcome = widen(
		METHODS[rules.method]({ distribution, rules, sides }),
		rules,
		options.widening
	);
	if (outcome.status === 'refused') {
		return refused([outcome.message, ...gates], outcome.requiredSampleSize);
	}
	if (gates.length > 0) return refused(gates);
	const isUntested = rules.method === 'sigma' && options.declaredBasis !== 'tested';
	const houseRule = isUntested ? [limitMessages.sigmaNeedsTest(rules.k ?? DEFAULT_K)] : [];
	if (isUntested && options.allowsHouseRule !== true) return refused(houseRule);

	const lots = lotTest(distribution);
	const { isPooled } = outcome;
	const uncertainty = statedUncertainty(distribution, rules, options.uncertainty);
	const limitOn = (side: Side) => {
		const limit = outcome.limits[side];
		return limit === undefined
			? null
			: limitValueOn(side, limit, { distribution, rules, options, lots, isPooled, uncertainty });
	};
	const [minimum, maximum] = [limitOn('minimum'), limitOn('maximum')];

	if (minimum !== null && minimum.printed <= 0 && minimum.raw > 0) {
		return refused([limitMessages.nothingLeft()]);
	}
	if (
		(minimum !== null && minimum.raw > typical.raw) ||
		(maximum !== null && maximum.raw < typical.raw)
	) {
		return refused([limitMessages.medianOutside()]);
	}
	const test = { minimum: minimum?.test?.value ?? null, maximum: maximum?.test?.value ?? null };
	return {
		minimum,
		maximum,
		refusals: [],
		warnings: [
			...modelWarnings(distribution, {
				lots,
				isPooled,
				method: rules.method,
				span: rules.span
			}),
			...outcome.warnings,
			...houseRule,
			...(minimum?.text === typical.text ? [limitMessages.equalsTypical('minimum')] : []),
			...(maximum?.text === typical.text ? [limitMessages.equalsTypical('maximum')] : [])
		],
		...(test.minimum === null && test.maximum === null
			? {}
			: { testYield: testYield(distribution, test) })
	};
}
