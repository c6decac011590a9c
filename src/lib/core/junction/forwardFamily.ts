import { JunctionDataError } from './errors';
import { cheung, fitForward, type ForwardFit } from './fitForward';

/** Cheung's R_s from dV/d ln I and again from H(I), and n: a check of the fit by another method. */
export interface ForwardCheck {
	readonly ideality: number;
	readonly seriesResistance: number;
	readonly seriesResistanceAgain: number;
}

/** What a forward curve gives, or why it gives nothing. */
export type ForwardResult =
	| { readonly status: 'fitted'; readonly fit: ForwardFit; readonly check: ForwardCheck | string }
	| { readonly status: 'refused'; readonly reason: string };

/**
 * From so many saturation currents on the −1 of the diode law is less than 0.1 %; from twenty on
 * it would move n enough to add 4 % to the second R_s of a sweep made from the law.
 */
const FAR_ABOVE = 1000;

/**
 * n, I_s and R_s of one forward curve by the fitted law, and n and R_s again by Cheung's functions
 * over the points where I ≫ I_s. The barrier isn't given: it needs a Richardson constant.
 *
 * @param points forward voltage in V and current in A, both above zero, by rising voltage
 * @param temperature in K
 */
export function forwardFamily(
	points: readonly (readonly [voltage: number, current: number])[],
	temperature: number
): ForwardResult {
	try {
		const fit = fitForward(
			points.map(([voltage]) => voltage),
			points.map(([, current]) => current),
			temperature
		);
		return { status: 'fitted', fit, check: checkOf(points, fit, temperature) };
	} catch (problem) {
		if (problem instanceof JunctionDataError) return { status: 'refused', reason: problem.message };
		throw problem;
	}
}

function checkOf(
	points: readonly (readonly [number, number])[],
	{ model }: ForwardFit,
	temperature: number
): ForwardCheck | string {
	const above = points.filter(([, current]) => current > FAR_ABOVE * model.saturationCurrent);
	try {
		return cheung(
			above.map(([voltage]) => voltage),
			above.map(([, current]) => current),
			// Only the barrier, which is not given, depends on area and Richardson constant.
			{ area: 1, richardson: 1, temperature }
		);
	} catch (problem) {
		if (problem instanceof JunctionDataError) return problem.message;
		throw problem;
	}
}
