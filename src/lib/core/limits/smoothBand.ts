import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import type { LimitRow } from './limit';
import { medianOf } from './typicalValue';

/** Limits and median at a bias before drift, uncertainty and rounding, in SI. */
export interface BandPoint {
	readonly bias: number;
	readonly minimum: number | null;
	readonly typical: number;
	readonly maximum: number | null;
}

/** A measured bias: its limits and the distribution they come from. */
export interface MeasuredPoint {
	readonly limit: Pick<LimitRow, 'condition' | 'minimum' | 'maximum'>;
	readonly distribution: Distribution;
}

/** A bias between measured ones, with its distribution. */
export interface PointBetween {
	readonly bias: number;
	readonly distribution: Distribution;
}

type Side = 'minimum' | 'maximum';

/**
 * A band for the screen at measured biases and between them. Between, a limit stands as many standard
 * deviations of its own distribution from its own median as its neighbours do from theirs, straight
 * between them: that distance depends on numbers of devices and lots and on their shares of the
 * variance, which hardly change from one bias to the next. Nothing of it is printed.
 */
export function smoothBand(
	measured: readonly MeasuredPoint[],
	between: readonly PointBetween[]
): BandPoint[] {
	const known = measured
		.map(({ limit, distribution }) => ({
			bias: limit.condition.reverseVoltage ?? 0,
			typical: medianOf(distribution),
			minimum: limit.minimum?.raw ?? null,
			maximum: limit.maximum?.raw ?? null,
			distribution
		}))
		.sort((a, b) => a.bias - b.bias);
	const added = between.flatMap(({ bias, distribution }): BandPoint[] => {
		const above = known.findIndex((of) => of.bias > bias);
		const [left, right] = [known[above - 1], known[above]];
		if (left === undefined || right === undefined) return [];
		const share = (bias - left.bias) / (right.bias - left.bias);
		const limitOn = (side: Side): number | null => {
			const [a, b] = [distanceOf(left, side), distanceOf(right, side)];
			if (a === null || b === null) return null;
			return atDistance(distribution, a + share * (b - a));
		};
		return [
			{
				bias,
				typical: medianOf(distribution),
				minimum: limitOn('minimum'),
				maximum: limitOn('maximum')
			}
		];
	});
	return [
		...known.map(({ bias, minimum, typical, maximum }) => ({ bias, minimum, typical, maximum })),
		...added
	].sort((a, b) => a.bias - b.bias);
}

/** Of a limit from its median, in standard deviations of transformed values. */
function distanceOf(
	at: Pick<BandPoint, Side> & { readonly distribution: Distribution },
	side: Side
): number | null {
	const { transform, standardDeviation } = at.distribution;
	const limit = at[side];
	if (limit === null) return null;
	if (standardDeviation === 0) return 0;
	const { apply } = TRANSFORMS[transform];
	return (apply(limit) - apply(medianOf(at.distribution))) / standardDeviation;
}

function atDistance(distribution: Distribution, distance: number): number {
	const { apply, invert } = TRANSFORMS[distribution.transform];
	return invert(apply(medianOf(distribution)) + distance * distribution.standardDeviation);
}
