import { z } from 'zod';

/** Approving a revision, or returning it with a reason. */
export const reviewDecisionForm = z.object({
	decision: z.enum(['approve', 'return']),
	reason: z.string().trim().max(2000).default('')
});
