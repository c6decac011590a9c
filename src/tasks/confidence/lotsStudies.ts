import { coveringHalfWidth } from '$lib/core/stats/coveringHalfWidth';
import { nestedStrata, oneWayStrata, type LotStrata } from '$lib/core/stats/lotStrata';
import { lotsHalfWidthConfidence, lotsMarginConfidence } from '$lib/core/stats/lotsToleranceMargin';
import { normalQuantile } from '$lib/core/stats/normalQuantile';
import {
	drawSums,
	LOT_SHARES,
	lotSizes,
	NESTED,
	nestedPopulation,
	ONE_WAY,
	oneWayPopulation,
	type Design,
	type Population
} from './design';
import { drawsFrom } from './draws';
import { PROMISE, SHARED_CONFIDENCE, type Study } from './study';

const { content, confidence } = PROMISE;
const Z = normalQuantile(content);

/** Half-widths needed at a mean so far off are tabulated: between points they are a straight line to 1e-6. */
const OFF_STEP = 1 / 512;
const offTable: number[] = [];
function halfWidthNeeded(mean: number): number {
	const position = Math.abs(mean) / OFF_STEP;
	const at = Math.floor(position);
	const entry = (i: number) => (offTable[i] ??= coveringHalfWidth(i * OFF_STEP, content));
	return entry(at) + (position - at) * (entry(at + 1) - entry(at));
}

/**
 * Whether the limits of one sample keep the content, without solving for them: a margin reaches as
 * far as needed exactly when the generalized confidence at what is needed is not above γ.
 */
export function lotsLimitsHold(strata: LotStrata): readonly [boolean, boolean, boolean] {
	const { mean } = strata;
	const confidenceOf = lotsMarginConfidence(strata, content);
	/** The minimum must reach the quantile −z of the population, a maximum z. */
	const atMinimum = confidenceOf(Z + mean);
	const atWorst = mean >= 0 ? atMinimum : confidenceOf(Z - mean);
	return [
		atMinimum <= confidence,
		atWorst <= SHARED_CONFIDENCE,
		lotsHalfWidthConfidence(strata, content)(halfWidthNeeded(mean)) <= confidence
	];
}

function study(design: Design, population: Population, isNested: boolean): Study {
	return {
		method: 'lots',
		promises: ['one limit', 'each', 'between'],
		shape: design.shape,
		lotSizes: lotSizes(design),
		lotShare: population.lot,
		simulate: (random) => {
			const draws = drawsFrom(random);
			return () => {
				const sums = drawSums(design, population, draws);
				return lotsLimitsHold(isNested ? nestedStrata(sums) : oneWayStrata(sums.flat()));
			};
		}
	};
}

/** Limits for future lots: one-way and nested, balanced and not. */
export const LOTS_STUDIES: readonly Study[] = LOT_SHARES.flatMap((share) => [
	...ONE_WAY.map((design) => study(design, oneWayPopulation(share), false)),
	...NESTED.map((design) => study(design, nestedPopulation(share), true))
]);
