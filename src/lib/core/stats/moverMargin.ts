import { chiSquareQuantile } from './chiSquare';
import { OutsideDomainError } from './errors';
import type { LotStrata } from './lotStrata';
import { normalQuantile } from './normalQuantile';
import { studentTQuantile } from './studentT';
import type { TolerancePromise } from './toleranceFactor';

/**
 * Upper confidence bound of a sum of variances, each with a share not below zero, by the modified
 * large-sample method: the bound of each alone, combined in quadrature.
 *
 * Source: Graybill and Wang 1980; Burdick and Graybill 1992, section 3.2.
 */
export function varianceSumUpperBound(strata: LotStrata['strata'], confidence: number): number {
	let [estimate, excess] = [0, 0];
	for (const { variance, degrees, share } of strata) {
		const part = share * variance;
		estimate += part;
		excess += (part * (degrees / chiSquareQuantile(1 - confidence, degrees) - 1)) ** 2;
	}
	return estimate + Math.sqrt(excess);
}

function lotStratum(strata: LotStrata['strata']) {
	const [lots] = strata;
	if (!lots) throw new OutsideDomainError('mover margin', 'at least 1 stratum', strata.length);
	return lots;
}

/**
 * A closed form of the one-sided margin for future lots, for any nesting: the bound of the mean and
 * the bound of the deviation, combined in quadrature. A second route to the quadrature of
 * `lotsToleranceMargin`, never printed: it may fall short of the confidence by half a per cent.
 *
 * Source: Zou and Donner's MOVER as applied by Krishnamoorthy and Lian 2012.
 */
export function moverMargin(strata: LotStrata, { content, confidence }: TolerancePromise): number {
	const lots = lotStratum(strata.strata);
	const z = normalQuantile(content);
	const t = studentTQuantile(confidence, lots.degrees);
	const deviation = Math.sqrt(
		strata.strata.reduce((sum, { variance, share }) => sum + variance * share, 0)
	);
	const bound = Math.sqrt(varianceSumUpperBound(strata.strata, confidence));
	return (
		z * deviation +
		Math.sqrt((t * t * lots.variance) / strata.lots + (z * (bound - deviation)) ** 2)
	);
}

/**
 * The closed form of half the distance between two limits with the content between both.
 *
 * Source: Krishnamoorthy and Lian 2012, Journal of Statistical Planning and Inference.
 */
export function moverHalfWidth(
	strata: LotStrata,
	{ content, confidence }: TolerancePromise
): number {
	const [lots, ...rest] = [lotStratum(strata.strata), ...strata.strata.slice(1)];
	const widened = { ...lots, share: lots.share * (1 + 1 / strata.lots) };
	const bound = varianceSumUpperBound([widened, ...rest], confidence);
	return normalQuantile((1 + content) / 2) * Math.sqrt(bound);
}
