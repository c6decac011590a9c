import { OutsideDomainError, SampleTooSmallError } from './errors';
import { noncentralTQuantile } from './noncentralT';
import { normalQuantile } from './normalQuantile';
import { requireProbability } from './requireProbability';

export interface TolerancePromise {
	/** P, the share of devices promised. */
	readonly content: number;
	/** γ, how sure the promise is. */
	readonly confidence: number;
}

/** The rows of a table have one sample size and promise: their factor is solved for once. */
const factors = new Map<string, number>();
const REMEMBERED = 512;

/**
 * k₁: mean + k₁·s lies above at least the content of a normal population, with the confidence.
 * Exact: t′(γ; n−1, z_P√n)/√n.
 *
 * Source: Krishnamoorthy and Mathew 2009, Statistical Tolerance Regions, section 2.2; ISO 16269-6.
 *
 * @throws {SampleTooSmallError} for fewer than two devices
 * @throws {OutsideDomainError} unless content and confidence lie between 0 and 1
 * @example oneSidedToleranceFactor(10, { content: 0.99, confidence: 0.95 }) // 3.981117845
 */
export function oneSidedToleranceFactor(sampleSize: number, promise: TolerancePromise): number {
	checkPromise('oneSidedToleranceFactor', sampleSize, promise);
	const key = `${sampleSize} ${promise.content} ${promise.confidence}`;
	const known = factors.get(key);
	if (known !== undefined) return known;
	const root = Math.sqrt(sampleSize);
	const noncentrality = normalQuantile(promise.content) * root;
	const factor = noncentralTQuantile(promise.confidence, sampleSize - 1, noncentrality) / root;
	if (factors.size >= REMEMBERED) factors.clear();
	factors.set(key, factor);
	return factor;
}

/** Guards shared by the tolerance factors of one normal sample. */
export function checkPromise(
	statistic: string,
	sampleSize: number,
	{ content, confidence }: TolerancePromise
): void {
	if (!Number.isInteger(sampleSize))
		throw new OutsideDomainError(statistic, 'a whole number of devices', sampleSize);
	if (sampleSize < 2) throw new SampleTooSmallError(statistic, 2, sampleSize);
	requireProbability(statistic, 'a content', content);
	requireProbability(statistic, 'a confidence', confidence);
}
