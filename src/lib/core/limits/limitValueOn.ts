import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { inSi } from '../units/unit';
import type { Side } from './allowance';
import type { LimitRowOptions } from './computeLimitRow';
import type { LimitValue } from './limit';
import { limitChain } from './limitChain';
import { limitSteps } from './limitSteps';
import type { LotTest } from './lotTest';
import type { SideLimit } from './methods/method';
import type { LimitPolicy } from './policy';
import { rawLimit } from './rawLimit';
import { sampleSteps } from './sampleSteps';
import type { UncertaintyUsed } from './statedUncertainty';
import { testLimit } from './testLimit';

export interface LimitContext {
	readonly distribution: Distribution;
	readonly rules: LimitPolicy;
	readonly options: LimitRowOptions;
	readonly lots: LotTest | undefined;
	readonly isPooled: boolean;
	readonly uncertainty: UncertaintyUsed;
}

/** One limit of a method carried to what is printed, with its derivation and its test limit. */
export function limitValueOn(side: Side, limit: SideLimit, context: LimitContext): LimitValue {
	const { distribution, rules, options, uncertainty } = context;
	const { condition, unit, unitScale, symbol = 'C' } = options;
	const chain = limitChain(
		rawLimit(limit, side, { transform: distribution.transform, unitScale }),
		{ side, rules, uncertainty: uncertainty.added, unitScale }
	);
	const tableUnit = { symbol: unit, scale: unitScale };
	const raw = inSi(chain.raw, tableUnit);
	const isTested = options.declaredBasis === 'tested' || rules.guardBand !== undefined;
	return {
		raw,
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
				limit,
				isPooled: context.isPooled,
				rules,
				lots: context.lots,
				stated: uncertainty.stated,
				uncertainty: uncertainty.added,
				chain
			})
		],
		...(isTested
			? {
					test: testLimit(chain.printed.value, {
						side,
						rules,
						uncertainty: uncertainty.stated ?? { relative: 0 },
						unit,
						unitScale
					})
				}
			: {}),
		...(distribution.standardDeviation > 0 ? { factor: distanceFromMean(raw, distribution) } : {})
	};
}

/** In standard deviations of the transformed values, never negative for a limit outside of the mean. */
function distanceFromMean(raw: number, distribution: Distribution): number {
	const y = TRANSFORMS[distribution.transform].apply(raw);
	return Math.abs(y - distribution.mean) / distribution.standardDeviation;
}
