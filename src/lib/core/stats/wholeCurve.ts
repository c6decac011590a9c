import { CurveSimulator, type BandSides, type CurveCovariance } from './curveSimulator';
import { OutsideDomainError, TooFewLotsError } from './errors';
import { mean } from './mean';
import { quantile } from './quantile';
import { normalSource, type RandomSource } from './randomSource';
import { requireProbability } from './requireProbability';
import { standardDeviation } from './standardDeviation';
import type { TolerancePromise } from './toleranceFactor';

export interface WholeCurveOptions extends TolerancePromise {
	readonly sides: BandSides;
	readonly random: RandomSource;
	/** Simulated samples, in ten batches. Default 400. */
	readonly simulations?: number;
}

export interface WholeCurveWidening {
	/** What a pointwise margin is multiplied with; 1 for a single point. */
	readonly widening: number;
	/** Of the widening, from the spread between batches. */
	readonly standardError: number;
	readonly simulations: number;
}

const BATCHES = 10;
const DEFAULT_SIMULATIONS = 400;

/** Future devices a batch: enough that some lie outside of the content. */
const futureDevices = (content: number) =>
	Math.min(20_000, Math.max(2_000, Math.ceil(30 / (1 - content))));

/**
 * By how much limits at each bias must be widened so that the content of devices lies inside *along
 * the entire curve*, with the same confidence. Samples of the same design are drawn from the
 * estimated covariances; each gives a factor that its band would have needed for the whole curve and,
 * in closed form, at each point alone. The ratio of the confidence quantiles is the widening; it is
 * applied to the exact pointwise margin, so that a plug-in covariance only has to carry the ratio.
 *
 * Covariance matrices are drawn by Bartlett's decomposition.
 *
 * @throws {TooFewLotsError} for fewer than two lots
 * @throws {OutsideDomainError} for matrices that do not fit the points
 */
export function wholeCurveWidening(
	curve: CurveCovariance,
	options: WholeCurveOptions
): WholeCurveWidening {
	const { points, lots } = curve;
	const { content, confidence, sides, random, simulations = DEFAULT_SIMULATIONS } = options;
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

	const normal = normalSource(random);
	const simulator = new CurveSimulator(curve, normal);
	const perBatch = Math.max(20, Math.ceil(simulations / BATCHES));
	const ratios: number[] = [];
	for (let batch = 0; batch < BATCHES; batch++) {
		const devices = simulator.drawDevices(futureDevices(content));
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
