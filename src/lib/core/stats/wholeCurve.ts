import { CurveSimulator, type BandSides, type CurveCovariance } from './curveSimulator';
import { OutsideDomainError, TooFewLotsError } from './errors';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from './lotsToleranceMargin';
import { mean } from './mean';
import { quantile } from './quantile';
import { normalSource, type RandomSource } from './randomSource';
import { requireProbability } from './requireProbability';
import { standardDeviation } from './standardDeviation';
import { tabulatedReach } from './tabulatedReach';
import type { TolerancePromise } from './toleranceFactor';

export interface WholeCurveOptions extends TolerancePromise {
	readonly sides: BandSides;
	readonly random: RandomSource;
	/** Simulated samples, in ten batches. Default 400. */
	readonly simulations?: number;
	/** Devices of future lots a batch. Default a hundred outside of the content, at most 40,000. */
	readonly devices?: number;
}

export interface WholeCurveWidening {
	/** What the pointwise margin of a limit for future lots is multiplied with; 1 for a single point. */
	readonly widening: number;
	/** Of the widening, from the spread between batches. */
	readonly standardError: number;
	readonly simulations: number;
}

const BATCHES = 10;
const DEFAULT_SIMULATIONS = 400;

/** Enough that the share outside is known to 3 % over all batches. */
const futureDevices = (content: number) =>
	Math.min(40_000, Math.max(4_000, Math.ceil(100 / (1 - content))));

/**
 * By how much limits for future lots at each bias must be widened so that the content of devices lies
 * inside *along the entire curve*, with the same confidence. Samples of the same design are drawn
 * from the estimated covariances and given their own limits; each tells what these would have to be
 * multiplied with for the whole curve and, in closed form, at each point alone. The ratio of the
 * confidence quantiles is the widening; it is applied to the pointwise margin, so that a plug-in
 * covariance only has to carry the ratio.
 *
 * The limits of the samples must be the very ones that are widened: with a fixed multiple of each
 * sample's deviation instead, three lots that carry most of the variance reach 88 % of 95 %.
 *
 * Covariance matrices are drawn by Bartlett's decomposition.
 *
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {OutsideDomainError} for matrices that do not fit the points, or a point without spread
 */
export function wholeCurveWidening(
	curve: CurveCovariance,
	options: WholeCurveOptions
): WholeCurveWidening {
	const { points, lots } = curve;
	const { content, confidence, sides, random, simulations = DEFAULT_SIMULATIONS } = options;
	const { devices: devicesPerBatch = futureDevices(content) } = options;
	requireProbability('wholeCurveWidening', 'a content', content);
	requireProbability('wholeCurveWidening', 'a confidence', confidence);
	if (lots < 2) throw new TooFewLotsError('wholeCurveWidening', 2, lots);
	for (const matrix of [curve.ofLotMeans, curve.withinLots])
		if (matrix.length !== points * points)
			throw new OutsideDomainError(
				'wholeCurveWidening',
				`${points} × ${points} values`,
				matrix.length
			);
	for (let p = 0; p < points; p++)
		if (!(curve.withinLots[p * (points + 1)]! > 0))
			throw new OutsideDomainError(
				'wholeCurveWidening',
				'a spread within lots at every point',
				curve.withinLots[p * (points + 1)]!
			);

	const reachOf = sides === 'both' ? lotsToleranceHalfWidth : lotsToleranceMargin;
	const marginOf = tabulatedReach((strata) => reachOf(strata, { content, confidence }), curve);
	const simulator = new CurveSimulator(curve, marginOf, normalSource(random));
	const perBatch = Math.max(20, Math.ceil(simulations / BATCHES));
	const ratios: number[] = [];
	for (let batch = 0; batch < BATCHES; batch++) {
		const devices = simulator.drawDevices(devicesPerBatch);
		const whole = new Float64Array(perBatch);
		const single = Array.from({ length: points }, () => new Float64Array(perBatch));
		for (let i = 0; i < perBatch; i++) {
			simulator.drawSample();
			whole[i] = simulator.wholeFactor(devices, content, sides);
			for (let p = 0; p < points; p++) single[p]![i] = simulator.pointFactor(p, content, sides);
		}
		const pointwise = mean(single.map((factors) => quantile(factors.sort(), confidence)));
		ratios.push(quantile(whole.sort(), confidence) / pointwise);
	}
	return {
		widening: points === 1 ? 1 : Math.max(1, mean(ratios)),
		standardError: standardDeviation(ratios) / Math.sqrt(BATCHES),
		simulations: perBatch * BATCHES
	};
}
