import { z } from 'zod';
import { measurementMessages } from '$lib/core/messages/measurements';

/**
 * Why a sweep may be left out. A genuine device goes only when production would reject its like;
 * otherwise only what went wrong while measuring goes.
 */
export const EXCLUSION_GROUNDS = {
	fault: 'measurement fault',
	screen: 'production screen that rejects its like'
} as const;

export const verdictForm = z.object({
	device: z.coerce.number().int().min(0),
	conditionKey: z.string(),
	decision: z.enum(['keep', 'exclude']),
	ground: z.enum(['fault', 'screen']).default('fault'),
	reason: z.string().trim().min(1, measurementMessages.reasonNeeded()).max(1000)
});
export type VerdictForm = z.infer<typeof verdictForm>;

/** The reason as it is kept: an exclusion names its ground. */
export function verdictReason({ decision, ground, reason }: VerdictForm): string {
	if (decision === 'keep') return reason;
	const words = EXCLUSION_GROUNDS[ground];
	return `${words.slice(0, 1).toUpperCase()}${words.slice(1)}: ${reason}`;
}
