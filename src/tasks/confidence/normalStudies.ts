import { normalBetween } from '$lib/core/stats/normalDistribution';
import { normalQuantile } from '$lib/core/stats/normalQuantile';
import { oneSidedToleranceFactor } from '$lib/core/stats/toleranceFactor';
import { twoSidedToleranceFactor } from '$lib/core/stats/twoSidedFactor';
import { poolGroups } from '$lib/core/stats/varianceComponents';
import { drawSums, LOT_SHARES, lotSizes, ONE_WAY, oneWayPopulation, type Design } from './design';
import { drawsFrom } from './draws';
import { PROMISE, SHARED_CONFIDENCE, type Study } from './study';

const { content } = PROMISE;
const Z = normalQuantile(content);

function study(design: Design, lotShare: number): Study {
	const devices = design.lots.flat().reduce((sum, size) => sum + size, 0);
	const single = oneSidedToleranceFactor(devices, PROMISE);
	const shared = oneSidedToleranceFactor(devices, { content, confidence: SHARED_CONFIDENCE });
	const between = twoSidedToleranceFactor(devices, PROMISE);
	return {
		method: 'normal',
		promises: ['one limit', 'each', 'between'],
		shape: design.shape,
		lotSizes: lotSizes(design),
		lotShare,
		simulate: (random) => {
			const draws = drawsFrom(random);
			return () => {
				const { mean, sumOfSquares } = poolGroups(
					drawSums(design, oneWayPopulation(lotShare), draws).flat()
				);
				const deviation = Math.sqrt(sumOfSquares / (devices - 1));
				return [
					mean - single * deviation <= -Z,
					Math.abs(mean) + Z <= shared * deviation,
					normalBetween(mean - between * deviation, mean + between * deviation) >= content
				];
			};
		}
	};
}

/** One normal population from all lots pooled; it holds where lots are alike. */
export const NORMAL_STUDIES: readonly Study[] = LOT_SHARES.flatMap((share) =>
	ONE_WAY.filter(({ shape }) => shape !== 'lots of 150, 5, 2 …').map((design) =>
		study(design, share)
	)
);
