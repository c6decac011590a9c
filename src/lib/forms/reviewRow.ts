import { z } from 'zod';

/** A tick, a flag with what is wrong, or taking either back. */
export const reviewRowForm = z.object({
	row: z.string().min(1),
	verdict: z.enum(['tick', 'flag', 'clear']),
	text: z.string().trim().max(2000).default('')
});
