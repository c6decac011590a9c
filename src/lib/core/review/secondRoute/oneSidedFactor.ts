import { normalPoint, normalProbability } from './normalProbability';
import { simpson, type Strips } from './simpson';

/**
 * Strips of Simpson's rule, even: the fewer degrees of freedom, the larger k and the steeper the
 * integrand near 0. With these the factor is exact to 1e-10 from two devices up.
 */
const stripsFor = (freedom: number) => 2 * Math.ceil(Math.max(1000, 20_000 / freedom));

/** All rows of a table have the same few sample sizes: what was integrated once is kept. */
const known = new Map<string, number>();

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
export function oneSidedFactor(sampleSize: number, assurance: Assurance): number {
	const key = `${sampleSize} ${assurance.content} ${assurance.confidence}`;
	const factor = known.get(key) ?? integratedFactor(sampleSize, assurance);
	known.set(key, factor);
	return factor;
}

function integratedFactor(sampleSize: number, { content, confidence }: Assurance): number {
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

interface SpreadDensity extends Strips {
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
	const strips = stripsFor(freedom);
	const whole = simpson(shape, { from, to, strips });
	return { from, to, strips, density: (u) => shape(u) / whole };
}
