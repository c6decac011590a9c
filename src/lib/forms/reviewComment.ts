import { z } from 'zod';

/** A comment on a row; an empty row is the revision as a whole. */
export const reviewCommentForm = z.object({
	row: z.string().default(''),
	text: z.string().trim().min(1, 'Write a comment.').max(2000)
});
