import type { Distribution } from '../../distributions/summary';
import { computeLimitRow, type LimitRowOptions } from '../computeLimitRow';
import { independentLots } from '../independentLots';
import type { LimitPolicy } from '../policy';
import { selectLots } from '../selectLots';

/** What the limits would be without a lot, before rounding and in SI. */
export interface WithoutLot {
	readonly lot: string;
	readonly minimum: number | null;
	readonly maximum: number | null;
	/** Why there is none. */
	readonly refusals: readonly string[];
}

/**
 * The limits without each lot in turn: a limit that hangs on one lot shows. The count of lots is no
 * gate here, since leaving one out of the fewest allowed would always be refused.
 */
export function withoutEachLot(
	distribution: Distribution,
	rules: LimitPolicy,
	options: LimitRowOptions
): WithoutLot[] {
	const lots = independentLots(distribution);
	if (lots.length < 2) return [];
	return lots.flatMap(({ name }) => {
		const rest = selectLots(distribution, (lot) => lot !== name);
		if (rest === undefined) return [];
		const row = computeLimitRow(rest, { ...rules, minimumLots: 1, minimumDevices: 2 }, options);
		return [
			{
				lot: name,
				minimum: row.minimum?.raw ?? null,
				maximum: row.maximum?.raw ?? null,
				refusals: row.refusals
			}
		];
	});
}
