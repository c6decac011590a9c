import { z } from 'zod';
import { PUBLISHED_STATES } from '../limits/evidence/publishedLimit';

/** Rows of a published sheet that newer data no longer bears out as they stand. */
export const assessedRows = z.array(
	z.object({
		/** The row's id within the document. */
		row: z.string(),
		label: z.string(),
		state: z.enum(PUBLISHED_STATES),
		text: z.string()
	})
);
export type AssessedRows = z.infer<typeof assessedRows>;
