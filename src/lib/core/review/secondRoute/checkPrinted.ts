import type { Resolution } from '../../limits/policy';
import type { RouteCheck } from '../verificationEvidence';

/**
 * How far the two routes may lie apart before rounding, relative: one part in a million. Both are
 * exact to about 1e-10; what is above a millionth is a fault of one of them.
 */
export const ROUTE_TOLERANCE = 1e-6;

export type Side = 'minimum' | 'typical' | 'maximum';

/** The step a value is rounded to, in the unit of the value. */
export function roundingStep(value: number, resolution: Resolution): number {
	if ('step' in resolution) return resolution.step;
	return 10 ** (Math.floor(Math.log10(Math.abs(value))) - resolution.significantFigures + 1);
}

/**
 * Compares a printed number with the second route: a minimum must lie at or below it by less than
 * one step, a maximum at or above, a typical value within half a step.
 *
 * @param printed the digits on the sheet
 * @param value of the second route, unrounded, in the same unit
 */
export function checkPrinted(
	side: Side,
	printed: string,
	value: number,
	resolution: Resolution
): RouteCheck {
	const shown = Number(printed.replace('\u2212', '-'));
	const step = Math.max(roundingStep(value, resolution), roundingStep(shown, resolution));
	const slack = ROUTE_TOLERANCE * Math.abs(value);
	const outwards = side === 'minimum' ? value - shown : shown - value;
	const agrees =
		side === 'typical'
			? Math.abs(shown - value) <= step / 2 + slack
			: outwards >= -slack && outwards < step + slack;
	return {
		value,
		text: value.toFixed(Math.min(decimalsOf(printed) + 1, 12)),
		deviationPercent: ((shown - value) / value) * 100,
		agrees
	};
}

function decimalsOf(printed: string): number {
	return printed.split('.')[1]?.length ?? 0;
}
