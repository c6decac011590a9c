import { SampleTooSmallError } from './errors';

/**
 * Arithmetic mean, with a second pass that removes what rounding left over in the first.
 *
 * @throws {SampleTooSmallError} for no values
 */
export function mean(values: ArrayLike<number>): number {
	const count = values.length;
	if (count === 0) throw new SampleTooSmallError('mean', 1, 0);
	let sum = 0;
	for (let i = 0; i < count; i++) sum += values[i]!;
	const first = sum / count;
	let rest = 0;
	for (let i = 0; i < count; i++) rest += values[i]! - first;
	return first + rest / count;
}
