/**
 * Lambert's W of e^x, that is the w > 0 with w + ln w = x: given by its logarithm, because the
 * argument itself overflows in a diode equation.
 *
 * Halley's method on w + ln w − x, from the asymptote on either side.
 *
 * Source: Corless et al. 1996, On the Lambert W function.
 *
 * @example lambertWOfExp(1) // 1
 */
export function lambertWOfExp(x: number): number {
	if (x < -700) return Math.exp(x);
	let w = x > 1 ? x - Math.log(x) : Math.exp(Math.min(x, x - Math.exp(x) / 2));
	for (let i = 0; i < 50; i++) {
		const excess = w + Math.log(w) - x;
		const slope = 1 + 1 / w;
		const curvature = -1 / (w * w);
		const step = excess / (slope - (excess * curvature) / (2 * slope));
		w = Math.max(w - step, w / 8);
		if (Math.abs(step) <= 2e-16 * w) break;
	}
	return w;
}
