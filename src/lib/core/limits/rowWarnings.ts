import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import { fixed, pValue } from './digits';
import { independentLots } from './independentLots';
import { limitationsOf } from './limitations';
import { LOTS_DIFFER_BELOW, type LotTest } from './lotTest';
import type { LimitMethod, LimitPolicy } from './policy';

/** Below this probability of the Anderson–Darling statistic the shape is said not to be normal. */
const NOT_NORMAL_BELOW = 0.005;

/** What a reader must know of the sample behind a promised limit. */
export function sampleWarnings(
	distribution: Distribution,
	{ isPromised, isUncertaintyStated }: { isPromised: boolean; isUncertaintyStated: boolean }
): string[] {
	const { quarantined, origin, censoring, sampleSize } = distribution;
	const censored = (censoring?.atOrBelow ?? 0) + (censoring?.atOrAbove ?? 0);
	return [
		...(quarantined > 0 ? [limitMessages.quarantined(quarantined)] : []),
		...(origin === 'entered' ? [limitMessages.enteredSummary()] : []),
		...(censored > 0 ? [limitMessages.censored(censored, sampleSize)] : []),
		...(isPromised && !isUncertaintyStated ? [limitMessages.uncertaintyNotStated()] : [])
	];
}

export interface ModelOptions {
	readonly lots: LotTest | undefined;
	readonly isPooled: boolean;
	readonly method: LimitMethod;
	readonly span: LimitPolicy['span'];
}

/** What speaks against the model that a limit rests on, and where it is known to fall short. */
export function modelWarnings(
	distribution: Distribution,
	{ lots, isPooled, method, span }: ModelOptions
): string[] {
	const { normality } = distribution;
	const differ = isPooled && lots !== undefined && lots.p < LOTS_DIFFER_BELOW;
	const restsOnNormality = method === 'normal' || method === 'lots';
	const known = limitationsOf({
		method: span === 'whole-curve' ? 'whole curve' : method,
		lotSizes: independentLots(distribution).map(({ sampleSize }) => sampleSize)
	});
	return [
		...(differ ? [limitMessages.lotsDiffer(lots.lots, lotRatio(lots), pValue(lots.p))] : []),
		// What the lots themselves show says more than what pooling does in general.
		...known.filter(({ name }) => !(differ && name === 'pooled lots')).map((of) => of.sentence()),
		...(restsOnNormality && normality !== null && normality.pValue < NOT_NORMAL_BELOW
			? [limitMessages.notNormal(fixed(normality.statistic, 2), pValue(normality.pValue))]
			: [])
	];
}

function lotRatio({ F }: LotTest): string {
	return Number.isFinite(F) ? fixed(F, 2) : '∞';
}
