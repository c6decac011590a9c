import type { Distribution } from '../../distributions/summary';
import { limitMessages } from '../../messages/limits';
import { normalLowerTail } from '../../stats/normalDistribution';
import type { Side } from '../allowance';
import { allowedOutside } from '../allowedOutside';
import type { Basis } from '../basis';
import { countBeyond } from '../countBeyond';
import type { LimitRow } from '../limit';
import type { LimitPolicy } from '../policy';

/** What newer data makes of a published limit, worst first. */
export const PUBLISHED_STATES = ['contradicted', 'unsupported', 'moved', 'holds'] as const;
export type PublishedState = (typeof PUBLISHED_STATES)[number];

/** A limit as it stands on a published sheet; SI. */
export interface PublishedLimit {
	readonly minimum: number | null;
	readonly maximum: number | null;
	readonly basis: Basis;
	readonly unit: string;
	readonly unitScale: number;
}

export interface Assessment {
	readonly state: PublishedState;
	/** What happened to it, empty when it holds. */
	readonly text: string;
}

export interface AssessedData {
	/** All accepted devices at the condition now. */
	readonly distribution: Distribution;
	/** The limits recomputed from them by the same policy version. */
	readonly recomputed: LimitRow;
	readonly rules: LimitPolicy;
}

/**
 * A published limit against the data of today: **contradicted** when more devices lie outside than
 * the basis allows (the first question is then the disposition of the lot), **unsupported** when the
 * recomputed limit would be looser or is refused, merely **moved** when it would be tighter.
 */
export function assessPublished(published: PublishedLimit, data: AssessedData): Assessment {
	const found = (['minimum', 'maximum'] as const).flatMap((side) => {
		const limit = published[side];
		return limit === null ? [] : [assessSide(side, limit, published, data)];
	});
	const worst = PUBLISHED_STATES.find((state) => found.some((one) => one.state === state));
	return {
		state: worst ?? 'holds',
		text: found
			.filter(({ state }) => state === worst && state !== 'holds')
			.map(({ text }) => text)
			.join(' ')
	};
}

function assessSide(
	side: Side,
	limit: number,
	{ basis, unit, unitScale }: PublishedLimit,
	{ distribution, recomputed, rules }: AssessedData
): Assessment {
	const words = (value: number) => `${Number((value / unitScale).toPrecision(6))}\u00a0${unit}`;
	const factor = recomputed[side]?.factor;
	// Without a limit of today, the content itself is the share that may lie outside.
	const share = factor === undefined ? 1 - rules.content : normalLowerTail(-factor);
	const { sampleSize } = distribution;
	const allowed = allowedOutside(basis, sampleSize, { share, confidence: rules.confidence });
	const outside = countBeyond(distribution, side, limit) ?? sampleSize;
	if (allowed !== null && outside > allowed) {
		const text = limitMessages.contradicted(side, words(limit), { outside, allowed, sampleSize });
		return { state: 'contradicted', text };
	}
	const now = recomputed[side];
	if (now === null) {
		const why = recomputed.refusals.join(' ');
		return { state: 'unsupported', text: limitMessages.noLongerComputed(side, why) };
	}
	const looser = side === 'minimum' ? now.printed < limit : now.printed > limit;
	const isSame = Math.abs(now.printed - limit) <= 1e-9 * Math.abs(limit);
	if (isSame) return { state: 'holds', text: '' };
	return looser && basis !== 'tested'
		? { state: 'unsupported', text: limitMessages.unsupported(side, words(limit), now.text) }
		: { state: 'moved', text: limitMessages.moved(side, words(limit), now.text) };
}
