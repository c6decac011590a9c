import { chiSquareBeyond } from './chiSquareBeyond';
import { whereReached } from './halve';
import { normalPoint, normalProbability } from './normalProbability';
import type { Assurance } from './oneSidedFactor';
import { simpsonPoints } from './simpson';

/** The mean errs by less than this many of its deviations, but for 1e-16. */
const FAR = 8.3;
const STRIPS = 400;

const known = new Map<string, number>();

/**
 * k of mean ± k·s with the content between both, by Simpson's rule over the error of the mean:
 * γ(k) = ∫ φ(z) P(χ²_ν > ν r(z/√n)²/k²) dz with Φ(x + r) − Φ(x − r) = P.
 * Definition: ISO 16269-6:2014, annex on exact factors (number from memory).
 */
export function twoSidedFactor(sampleSize: number, assurance: Assurance): number {
	const key = `${sampleSize} ${assurance.content} ${assurance.confidence}`;
	const factor = known.get(key) ?? integratedFactor(sampleSize, assurance);
	known.set(key, factor);
	return factor;
}

function integratedFactor(sampleSize: number, { content, confidence }: Assurance): number {
	const freedom = sampleSize - 1;
	const points = simpsonPoints({ from: 0, to: FAR, strips: STRIPS }).map(({ at, weight }) => ({
		square: reach(at / Math.sqrt(sampleSize), content) ** 2,
		weight: (2 * weight * Math.exp((-at * at) / 2)) / Math.sqrt(2 * Math.PI)
	}));
	return whereReached(
		(k) =>
			k <= 0
				? 0
				: points.reduce(
						(sum, { square, weight }) =>
							sum + weight * chiSquareBeyond((freedom * square) / (k * k), freedom),
						0
					),
		confidence
	);
}

/** Half the width about a point off by x that holds the content. */
function reach(x: number, content: number): number {
	let low = 0;
	let high = x + normalPoint((1 + content) / 2) + 1;
	for (let step = 0; step < 60; step++) {
		const middle = (low + high) / 2;
		const held = normalProbability(x + middle) - normalProbability(x - middle);
		if (held < content) low = middle;
		else high = middle;
	}
	return (low + high) / 2;
}
