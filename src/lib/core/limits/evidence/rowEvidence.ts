import type { Distribution } from '../../distributions/summary';
import { normalLowerTail } from '../../stats/normalDistribution';
import type { Side } from '../allowance';
import { allowedOutside } from '../allowedOutside';
import type { Basis } from '../basis';
import { countBeyond } from '../countBeyond';
import type { LimitRow, LimitValue } from '../limit';
import type { LimitPolicy } from '../policy';
import { capability, type Capability } from './capability';

/** Stored devices beyond one printed limit. */
export interface DevicesOutside {
	/** `null` where more lie outside than are stored one by one. */
	readonly count: number | null;
	/** As many as the basis allows; `null` for a typical value, which promises nothing. */
	readonly allowed: number | null;
}

export interface RowEvidence {
	/** `null` without a limit, and where only sums are stored. */
	readonly minimum: DevicesOutside | null;
	readonly maximum: DevicesOutside | null;
	/** Ppk against the printed limits; `null` without a limit, without spread or with censored readings. */
	readonly capability: Capability | null;
}

/** What the stored devices say about the printed limits of a row. */
export function rowEvidence(
	distribution: Distribution,
	row: Pick<LimitRow, 'minimum' | 'maximum' | 'basis'>,
	rules: Pick<LimitPolicy, 'content' | 'confidence'>,
	/** Whether the limits came from these same devices; yes, unless a person decided them. */
	isCircular = true
): RowEvidence {
	const { minimum, maximum, basis } = row;
	const { lowest } = distribution.extremes;
	const on = (side: Side, limit: LimitValue | null) =>
		limit === null || lowest.length === 0
			? null
			: devicesOutside(distribution, { side, printed: limit.printed, basis, limit, rules });
	return {
		minimum: on('minimum', minimum),
		maximum: on('maximum', maximum),
		capability:
			capability(
				distribution,
				{
					...(minimum === null ? {} : { minimum: minimum.printed }),
					...(maximum === null ? {} : { maximum: maximum.printed })
				},
				{ confidence: rules.confidence, isCircular }
			) ?? null
	};
}

/**
 * The stored devices beyond a printed value, and as many as the basis allows: the share that the
 * computed limit leaves outside, or where none is computed the content itself.
 */
export function devicesOutside(
	distribution: Distribution,
	of: {
		readonly side: Side;
		/** SI */
		readonly printed: number;
		readonly basis: Basis;
		/** The computed limit. */
		readonly limit: Pick<LimitValue, 'factor'> | null;
		readonly rules: Pick<LimitPolicy, 'content' | 'confidence'>;
	}
): DevicesOutside {
	const factor = of.limit?.factor;
	const share = factor === undefined ? 1 - of.rules.content : normalLowerTail(-factor);
	const { confidence } = of.rules;
	return {
		count: countBeyond(distribution, of.side, of.printed) ?? null,
		allowed: allowedOutside(of.basis, distribution.sampleSize, { share, confidence })
	};
}
