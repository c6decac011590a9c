import { whereReached } from './halve';
import { levelVariance, sumOfLevels, type VarianceTable } from './levelVariance';
import type { LotSpread } from './lotSpread';
import { normalPoint } from './normalProbability';
import type { Assurance } from './oneSidedFactor';

/** The error of the mean in its own deviations, and its strips. */
const FAR = 8;
const ERROR_STRIPS = 64;

const ERRORS = Array.from({ length: ERROR_STRIPS + 1 }, (_, strip) => {
	const x = -FAR + (2 * FAR * strip) / ERROR_STRIPS;
	const width = (2 * FAR) / ERROR_STRIPS;
	return { x, weight: (width * Math.exp((-x * x) / 2)) / Math.sqrt(2 * Math.PI) };
});

/**
 * Distance of a one-sided limit from the mean of lot means for devices of future lots: the margin at
 * which Z·√(V_L/a) + z_P·√(V_L + W) stays below with confidence γ, V_L = SS_L/χ² and W the levels
 * inside a lot. For each Z the lots' variance has a largest value, from which the rest is integrated.
 * It shares no line with `core/stats`.
 *
 * Definition: Krishnamoorthy and Mathew 2009, chapters 4 and 5.
 */
export function lotsMargin(spread: LotSpread, { content, confidence }: Assurance): number {
	const [lot, ...inside] = spread.levels;
	const z = normalPoint(content);
	const root = Math.sqrt(spread.lots);
	const lots = levelVariance(lot);
	const within = sumOfLevels(inside);
	return scaled(spread, (unit) =>
		whereReached((margin) => {
			const m = margin * unit;
			return ERRORS.reduce((reached, { x, weight }) => {
				const reach = x / root + z;
				const room = (variance: number) => {
					const left = (m - x * Math.sqrt(variance / spread.lots)) / z;
					return left <= 0 ? -1 : left * left - variance;
				};
				const largest = reach > 0 ? Math.max(0, m / reach) ** 2 : Infinity;
				return reached + weight * lots.expect(largest, (variance) => within.below(room(variance)));
			}, 0);
		}, confidence)
	);
}

/**
 * Half the distance between two limits with the content between both: the γ point of
 * z·√(V_L (1 + 1/a) + W), z that of (1 + P)/2.
 *
 * Definition: Liao, Lin and Iyer 2005.
 */
export function lotsHalfWidth(spread: LotSpread, { content, confidence }: Assurance): number {
	const [lot, ...inside] = spread.levels;
	const z = normalPoint((1 + content) / 2);
	const lots = levelVariance({ ...lot, share: lot.share * (1 + 1 / spread.lots) });
	const within: VarianceTable = sumOfLevels(inside);
	return scaled(spread, (unit) =>
		whereReached((halfWidth) => {
			const whole = ((halfWidth * unit) / z) ** 2;
			return lots.expect(whole, (variance) => within.below(whole - variance));
		}, confidence)
	);
}

/** Solves in units of the whole spread; 0 when nothing varies. */
function scaled({ levels }: LotSpread, solve: (unit: number) => number): number {
	const unit = Math.sqrt(
		levels.reduce((sum, { squares, degrees, share }) => sum + (share * squares) / degrees, 0)
	);
	return unit === 0 ? 0 : unit * solve(unit);
}
