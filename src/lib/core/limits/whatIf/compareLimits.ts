import type { Side } from '../allowance';
import type { LimitValue } from '../limit';

/** What a change makes of a limit: `tighter` is nearer to the devices. */
export const DIFFERENCES = ['tighter', 'looser', 'same', 'gained', 'lost', 'none'] as const;
export type Difference = (typeof DIFFERENCES)[number];

export interface Comparison {
	readonly difference: Difference;
	/** Of the limit before rounding, in %; `null` unless there are two limits. */
	readonly percent: number | null;
}

/**
 * A limit as it would be beside the stored one. Tighter and looser are told by the printed digits:
 * a change that rounding hides changes nothing a customer sees.
 */
export function compareLimits(
	side: Side,
	stored: LimitValue | null,
	tried: LimitValue | null
): Comparison {
	if (stored === null || tried === null) {
		return { difference: stored === tried ? 'none' : tried ? 'gained' : 'lost', percent: null };
	}
	const percent = (tried.raw / stored.raw - 1) * 100;
	if (stored.text === tried.text) return { difference: 'same', percent };
	const isUp = tried.printed > stored.printed;
	return { difference: isUp === (side === 'minimum') ? 'tighter' : 'looser', percent };
}

/** How many limits of a table differ in each way. */
export function countDifferences(
	comparisons: readonly Comparison[]
): Readonly<Record<Difference, number>> {
	const counts = { tighter: 0, looser: 0, same: 0, gained: 0, lost: 0, none: 0 };
	for (const { difference } of comparisons) counts[difference] += 1;
	return counts;
}
