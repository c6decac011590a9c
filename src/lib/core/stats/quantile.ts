import { OutsideDomainError, SampleTooSmallError } from './errors';

/**
 * Sample quantile, type 8 of Hyndman and Fan 1996 (median-unbiased whatever the distribution):
 * linear between order statistics at h = (n + 1/3)p + 1/3, held at the ends of the sample.
 *
 * @param sorted - ascending
 * @throws {SampleTooSmallError} for no values
 * @throws {OutsideDomainError} unless 0 ≤ p ≤ 1
 * @example quantile([1, 2, 3, 4], 0.25) // 1.416666…
 */
export function quantile(sorted: ArrayLike<number>, probability: number): number {
	const count = sorted.length;
	if (count === 0) throw new SampleTooSmallError('quantile', 1, 0);
	if (!(probability >= 0 && probability <= 1))
		throw new OutsideDomainError('quantile', 'a probability from 0 to 1', probability);
	const h = (count + 1 / 3) * probability + 1 / 3;
	const below = Math.min(count, Math.max(1, Math.floor(h + 4e-15 * count)));
	const above = Math.min(count, below + 1);
	const fraction = Math.min(1, Math.max(0, h - below));
	return sorted[below - 1]! + fraction * (sorted[above - 1]! - sorted[below - 1]!);
}
