import { noncentralTLowerTail } from '$lib/core/stats/noncentralT';
import { normalQuantile } from '$lib/core/stats/normalQuantile';
import { lineFromMoments } from '$lib/core/stats/regressionLine';
import { heightVariance } from '$lib/core/stats/regressionTolerance';
import type { RegressionLine } from '$lib/core/stats/regressionLine';
import { LOT_COUNTS, LOT_SHARES } from './design';
import { drawsFrom } from './draws';
import { PROMISE, type Study } from './study';

const { content, confidence } = PROMISE;
const Z = normalQuantile(content);

const PER_LOT = 25;
const CORRELATION = 0.9;
/** The test limit, in deviations above the mean of the tested quantity. */
const EDGE = 2;

/**
 * Whether the maximum at the edge reaches the content of devices at the edge, without solving for
 * its factor: k·s reaches as far as needed exactly when noncentral t at what is needed is not above γ.
 */
export function edgeLimitHolds(line: RegressionLine): boolean {
	const residual = Math.sqrt(1 - CORRELATION ** 2);
	const truth = CORRELATION * EDGE + Z * residual;
	const needed = (truth - line.intercept - line.slope * EDGE) / line.residualDeviation;
	const d = Math.sqrt(heightVariance(line, EDGE));
	return noncentralTLowerTail(needed / d, line.sampleSize - 2, Z / d) <= confidence;
}

/** Lots move the tested quantity, and all else along the line with it, by this share of its variance. */
const LOTS_ALONG_THE_LINE = 0.6;

/**
 * Pairs of a tested and an untested quantity, both of deviation 1. The lot share is that of the
 * residual variance: how far lots lie beside the line.
 */
function study(lots: number, lotShare: number): Study {
	const devices = lots * PER_LOT;
	const root = (share: number) => [Math.sqrt(share), Math.sqrt(1 - share)] as const;
	const [lotX, deviceX] = root(LOTS_ALONG_THE_LINE);
	const [lotY, deviceY] = root(lotShare);
	const residual = Math.sqrt(1 - CORRELATION ** 2);
	return {
		method: 'screened',
		promises: ['one limit'],
		shape: `lots of ${PER_LOT}`,
		lotSizes: Array.from({ length: lots }, () => PER_LOT),
		lotShare,
		simulate: (random) => {
			const { normal } = drawsFrom(random);
			return () => edgeOf(normal);
		}
	};

	function edgeOf(normal: () => number): readonly boolean[] {
		let [sumX, sumY, squareX, squareY, product] = [0, 0, 0, 0, 0];
		for (let lot = 0; lot < lots; lot++) {
			const [ofX, ofY] = [lotX * normal(), lotY * normal()];
			for (let d = 0; d < PER_LOT; d++) {
				const x = ofX + deviceX * normal();
				const y = CORRELATION * x + residual * (ofY + deviceY * normal());
				sumX += x;
				sumY += y;
				squareX += x * x;
				squareY += y * y;
				product += x * y;
			}
		}
		const [ssX, ssY, cross] = [
			squareX - sumX ** 2 / devices,
			squareY - sumY ** 2 / devices,
			product - (sumX * sumY) / devices
		];
		const line = lineFromMoments({
			sampleSize: devices,
			meanX: sumX / devices,
			meanY: sumY / devices,
			deviationX: Math.sqrt(ssX / (devices - 1)),
			deviationY: Math.sqrt(ssY / (devices - 1)),
			correlation: cross / Math.sqrt(ssX * ssY)
		});
		return [edgeLimitHolds(line)];
	}
}

/** The edge rule: it holds where lots move along the line, not where they lie beside it. */
export const SCREENED_STUDIES: readonly Study[] = LOT_SHARES.flatMap((share) =>
	LOT_COUNTS.map((lots) => study(lots, share))
);
