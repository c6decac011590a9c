import { z } from 'zod';

/** A block of the datasheet's text, with the version that was edited. */
export const textBlockForm = z.object({
	block: z.string().min(1),
	text: z.string().max(4000),
	rowVersion: z.coerce.number().int().nonnegative()
});
