import { normalPoint, normalProbability } from './normalProbability';

/** Even number of strips; the integrand is smooth, so that halving it changes nothing at 1e-12. */
const STRIPS = 2000;

export interface Assurance {
	/** P: share of devices on the right side. */
	readonly content: number;
	/** γ: how sure that is. */
	readonly confidence: number;
}

/**
 * k of the one-sided normal tolerance limit, by integrating the confidence itself and halving on k:
 *
 *   γ(k) = ∫ f(u) · Φ(√n (k·u − z_P)) du,   u = s/σ,   f the density of √(χ²_ν/ν), ν = n − 1
 *
 * `core/stats` inverts the noncentral t distribution instead; the two share no line.
 * Definition: ISO 16269-6:2014, clause 5 (number from memory).
 */
export function oneSidedFactor(sampleSize: number, { content, confidence }: Assurance): number {
	const z = normalPoint(content);
	const spread = spreadDensity(sampleSize - 1);
	const root = Math.sqrt(sampleSize);
	const confidenceAt = (k: number) =>
		simpson((u) => spread.density(u) * normalProbability(root * (k * u - z)), spread);

	let [low, high] = [-1, 1];
	while (confidenceAt(high) < confidence) high *= 2;
	while (confidenceAt(low) > confidence) low *= 2;
	for (let step = 0; step < 60 && high - low > 1e-13 * Math.abs(high); step++) {
		const middle = (low + high) / 2;
		if (confidenceAt(middle) < confidence) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}

interface SpreadDensity {
	readonly from: number;
	readonly to: number;
	readonly density: (u: number) => number;
}

/**
 * Density of s/σ with ν degrees of freedom, 2 (ν/2)^(ν/2) / Γ(ν/2) · u^(ν−1) · exp(−ν u²/2), scaled
 * by its own integral, so that no gamma function is needed, over the range outside which it is
 * below 1e-17 of its peak.
 */
function spreadDensity(freedom: number): SpreadDensity {
	const peak = Math.sqrt(Math.max(freedom - 1, 0) / freedom);
	const logShape = (u: number) =>
		(freedom === 1 ? 0 : (freedom - 1) * Math.log(u)) - (freedom * u * u) / 2;
	const top = peak === 0 ? 0 : logShape(peak);
	const shape = (u: number) => (u === 0 && freedom > 1 ? 0 : Math.exp(logShape(u) - top));
	const from = Math.max(0, peak - 9 / Math.sqrt(2 * freedom));
	const to = peak + 9 / Math.sqrt(freedom);
	const whole = simpson(shape, { from, to });
	return { from, to, density: (u) => shape(u) / whole };
}

/** Simpson's rule over `STRIPS` equal strips. */
function simpson(
	f: (u: number) => number,
	{ from, to }: { readonly from: number; readonly to: number }
): number {
	const width = (to - from) / STRIPS;
	let sum = f(from) + f(to);
	for (let strip = 1; strip < STRIPS; strip++)
		sum += (strip % 2 === 1 ? 4 : 2) * f(from + strip * width);
	return (sum * width) / 3;
}
