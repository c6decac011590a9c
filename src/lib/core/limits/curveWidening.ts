import { z } from 'zod';
import { curveCovariance, type JointDistribution } from '../distributions/jointDistribution';
import { randomSource } from '../stats/randomSource';
import { wholeCurveWidening } from '../stats/wholeCurve';
import type { Side } from './allowance';
import { engineVersion } from './engineVersion';
import { promiseOf } from './methods/promise';
import type { LimitPolicy } from './policy';

/** What limits at each bias are multiplied with, in their distance from the mean. */
export const curveWidening = z.object({
	widening: z.number().min(1),
	standardError: z.number().nonnegative(),
	simulations: z.number().int().positive(),
	/** Biases along which the content holds. */
	points: z.number().int().positive()
});
export type CurveWidening = z.infer<typeof curveWidening>;

/** Any number would do; the same one makes the same limit every time. */
const SEED = 20_260_105;

/**
 * The whole-curve factor of a policy for future lots, simulated from the stored covariances with a
 * fixed seed.
 *
 * @returns `undefined` where the joint distribution can't tell: fewer than two lots, one device a lot
 */
export function simulateWidening(
	joint: JointDistribution,
	rules: LimitPolicy,
	sides: readonly Side[]
): CurveWidening | undefined {
	const { lotSizes } = joint;
	if (lotSizes.length < 2 || lotSizes.every((size) => size < 2)) return undefined;
	const curve = curveCovariance(joint);
	if (curve === undefined) return undefined;
	const { content, confidence } = promiseOf(rules, sides);
	const [only] = sides;
	const found = wholeCurveWidening(curve, {
		content,
		confidence,
		sides: sides.length === 2 || only === undefined ? 'both' : only,
		random: randomSource(SEED)
	});
	return { ...found, points: curve.points };
}

/** Everything a whole-curve factor depends on, as one text in one order; its hash is the key. */
export function wideningInputText(
	joint: JointDistribution,
	{ content, confidence, tails }: LimitPolicy,
	sides: readonly Side[]
): string {
	return JSON.stringify({
		engine: engineVersion,
		promise: [content, confidence, tails, sides, SEED],
		biases: joint.biases,
		lotSizes: joint.lotSizes,
		lotMeans: [...joint.lotMeans],
		withinLots: [...joint.withinLots]
	});
}
