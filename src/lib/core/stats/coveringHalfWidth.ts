import { normalBetween, normalDensity } from './normalDistribution';
import { normalQuantile } from './normalQuantile';

/**
 * The half-width r of an interval about a point off centre, Φ(x + r) − Φ(x − r) = content: how wide
 * limits must be when the estimated mean is x true deviations away. r² is the quantile of a
 * noncentral chi-square with one degree of freedom and noncentrality x².
 *
 * @example coveringHalfWidth(0, 0.95) // 1.959963984540054
 */
export function coveringHalfWidth(offset: number, content: number): number {
	const x = Math.abs(offset);
	let lower = normalQuantile((1 + content) / 2);
	let upper = x + lower;
	let r = Math.max(lower, x + normalQuantile(content));
	for (let i = 0; i < 60; i++) {
		const excess = normalBetween(x - r, x + r) - content;
		if (excess > 0) upper = r;
		else lower = r;
		const slope = normalDensity(x + r) + normalDensity(x - r);
		let next = r - excess / slope;
		if (!(next >= lower && next <= upper)) next = (lower + upper) / 2;
		if (Math.abs(next - r) <= 2e-15 * next) return next;
		r = next;
	}
	return r;
}
