import { screenedMessages as say } from '../../messages/screened';
import type { RequestProblem } from '../../requestProblems';
import type { ScreenedRequest } from './screenedRequest';

/** Test limits, widened by the uncertainty of the tester. */
export interface ScreenWindow {
	/** In the unit of the tested values. */
	readonly low?: number;
	readonly high?: number;
	/** The same, transformed. */
	readonly lowest?: number;
	readonly highest?: number;
	readonly isWidened: boolean;
}

export type WindowOutcome =
	| { readonly status: 'read'; readonly window: ScreenWindow | null }
	| { readonly status: 'refused'; readonly problems: readonly RequestProblem[] };

const refused = (path: string, message: string): WindowOutcome => ({
	status: 'refused',
	problems: [{ path, message }]
});

/**
 * The window that a device has passed for certain: a tester that reads U off lets devices pass that
 * lie U beyond its limits. `null` where a ratio is limited without a test.
 */
export function screenWindow(request: ScreenedRequest): WindowOutcome {
	const { window, quantity, transform } = request;
	if (window?.low === undefined && window?.high === undefined)
		return quantity === 'ratio' && window === undefined
			? { status: 'read', window: null }
			: refused('window', say.windowMissing());
	if (window.low !== undefined && window.high !== undefined && !(window.low < window.high))
		return refused('window', say.windowCrossed());
	const low = widened(window.low, -1, request.uncertainty);
	const high = widened(window.high, 1, request.uncertainty);
	if (transform === 'ln') {
		if (low !== undefined && !(low > 0))
			return refused('window.low', say.windowNotPositive('low', low));
		if (high !== undefined && !(high > 0))
			return refused('window.high', say.windowNotPositive('high', high));
	}
	const transformed = (value: number) => (transform === 'ln' ? Math.log(value) : value);
	return {
		status: 'read',
		window: {
			...(low === undefined ? {} : { low, lowest: transformed(low) }),
			...(high === undefined ? {} : { high, highest: transformed(high) }),
			isWidened: low !== window.low || high !== window.high
		}
	};
}

function widened(
	value: number | undefined,
	direction: 1 | -1,
	uncertainty: ScreenedRequest['uncertainty'] = 0
): number | undefined {
	if (value === undefined) return undefined;
	if (typeof uncertainty === 'number') return value + direction * uncertainty;
	return 'absolute' in uncertainty
		? value + direction * uncertainty.absolute
		: value + direction * Math.abs(value) * uncertainty.relative;
}
