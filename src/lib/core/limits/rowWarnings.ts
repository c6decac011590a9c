import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import { fixed, pValue } from './digits';
import { LOTS_DIFFER_BELOW, type LotTest } from './lotTest';

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

/** What speaks against the model that a limit rests on. */
export function modelWarnings(
	{ normality }: Distribution,
	{
		lots,
		isPooled,
		restsOnNormality
	}: { lots: LotTest | undefined; isPooled: boolean; restsOnNormality: boolean }
): string[] {
	return [
		...(isPooled && lots !== undefined && lots.p < LOTS_DIFFER_BELOW
			? [limitMessages.lotsDiffer(lots.lots, lotRatio(lots), pValue(lots.p))]
			: []),
		...(restsOnNormality && normality !== null && normality.pValue < NOT_NORMAL_BELOW
			? [limitMessages.notNormal(fixed(normality.statistic, 2), pValue(normality.pValue))]
			: [])
	];
}

function lotRatio({ F }: LotTest): string {
	return Number.isFinite(F) ? fixed(F, 2) : '∞';
}
