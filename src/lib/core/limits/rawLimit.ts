import type { Transform } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import type { Side } from './allowance';
import { withoutNoise } from './digits';
import type { SideLimit } from './methods/method';

/** A limit before any allowance, in the unit of the table. */
export function rawLimit(
	limit: SideLimit,
	side: Side,
	{ transform, unitScale }: { readonly transform: Transform; readonly unitScale: number }
): number {
	if (limit.kind === 'ranked') return withoutNoise(limit.value / unitScale);
	const sign = side === 'minimum' ? -1 : 1;
	const transformed = limit.centre.value + sign * limit.factor * limit.deviation.value;
	return withoutNoise(TRANSFORMS[transform].invert(transformed) / unitScale);
}
