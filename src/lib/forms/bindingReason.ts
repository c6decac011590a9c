import { z } from 'zod';

/** A decision on a place that needs a reason: keeping what it prints, or striking it out. */
export const bindingReasonForm = z.object({
	place: z.string().min(1),
	reason: z.string().trim().max(500).default(''),
	/** Trace of the numbers that were compared with. */
	expected: z.string().max(64).optional()
});
