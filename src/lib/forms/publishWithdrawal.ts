import { z } from 'zod';

/** Withdrawing a release or bringing it back, with the reason. */
export const publishWithdrawalForm = z.object({
	version: z.string().regex(/^\d+\.\d+$/),
	event: z.enum(['withdraw', 'reinstate']),
	reason: z.string().trim().min(1, 'Say why.').max(2000)
});
