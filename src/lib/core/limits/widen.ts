import { limitMessages } from '../messages/limits';
import type { CurveWidening } from './curveWidening';
import { fixed } from './digits';
import type { MethodOutcome, SideLimit } from './methods/method';
import type { LimitPolicy } from './policy';

/**
 * Limits at a bias widened so that the content holds along the entire curve. Only limits for future
 * lots have a whole-curve factor; other methods are refused by name.
 */
export function widen(
	outcome: MethodOutcome,
	{ span, method }: Pick<LimitPolicy, 'span' | 'method'>,
	widening: CurveWidening | undefined
): MethodOutcome {
	if (span === 'each-bias' || outcome.status === 'refused') return outcome;
	if (method !== 'lots') {
		return { status: 'refused', message: limitMessages.wholeCurveNeedsLots(method) };
	}
	if (widening === undefined) {
		return { status: 'refused', message: limitMessages.wholeCurveNotSimulated() };
	}
	return {
		...outcome,
		limits: Object.fromEntries(
			Object.entries(outcome.limits).map(([side, limit]) => [side, widened(limit, widening)])
		)
	};
}

function widened(limit: SideLimit, by: CurveWidening): SideLimit {
	if (limit.kind === 'ranked') return limit;
	return {
		...limit,
		factor: limit.factor * by.widening,
		symbol: `${limit.symbol}, whole curve`,
		method: `${limit.method} Widened ${fixed(by.widening, 3)} times (± ${fixed(by.standardError, 3)}) to hold along all ${by.points} biases, by ${by.simulations} simulated samples of fixed seed.`
	};
}
