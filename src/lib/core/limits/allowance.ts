import { z } from 'zod';

/** The side of the devices a limit stands on. */
export type Side = 'minimum' | 'maximum';

/** How far a limit is moved for something: a share of its value, or an amount in SI. */
export const allowance = z.union([
	z.object({ relative: z.number().min(0).lt(1) }),
	z.object({ absolute: z.number().min(0) })
]);
export type Allowance = z.infer<typeof allowance>;

export const NO_ALLOWANCE: Allowance = { relative: 0 };

/** Away from the devices: a minimum down, a maximum up. In the unit of `unitScale`. */
export function moveOutwards(
	value: number,
	side: Side,
	{ by, unitScale }: { readonly by: Allowance; readonly unitScale: number }
): number {
	const sign = side === 'minimum' ? -1 : 1;
	return 'relative' in by
		? value + sign * Math.abs(value) * by.relative
		: value + (sign * by.absolute) / unitScale;
}

/**
 * Towards the devices, by as much as {@link moveOutwards} takes back: what passes the value found
 * here still keeps the limit after it has moved by the allowance.
 */
export function moveInwards(
	value: number,
	side: Side,
	{ by, unitScale }: { readonly by: Allowance; readonly unitScale: number }
): number {
	const sign = side === 'minimum' ? -1 : 1;
	return 'relative' in by
		? value / (1 + sign * Math.sign(value) * by.relative)
		: value - (sign * by.absolute) / unitScale;
}

export function isNothing(by: Allowance): boolean {
	return 'relative' in by ? by.relative === 0 : by.absolute === 0;
}
