import type { Allowance } from './allowance';
import { percent } from './digits';

/** `0.5 %`, or `0.05 pF`. */
export function allowanceText(
	allowance: Allowance,
	{ unit, unitScale }: { readonly unit: string; readonly unitScale: number }
): string {
	if ('relative' in allowance) return percent(allowance.relative);
	return `${Number((allowance.absolute / unitScale).toPrecision(6))}\u00a0${unit}`.trimEnd();
}
