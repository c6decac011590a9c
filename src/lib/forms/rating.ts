import { z } from 'zod';

/** A limiting value as it is typed: digits are checked against the slot when they are saved. */
export const ratingForm = z.object({
	place: z.string().min(1),
	minimum: z.string().trim().max(20).default(''),
	maximum: z.string().trim().max(20).default(''),
	reason: z.string().trim().max(500).default('')
});
