import { z } from 'zod';
import { basis } from '../core/limits/basis';

/** Binding a place to what the measurements say now. */
export const bindingBindForm = z.object({
	place: z.string().min(1),
	basis: basis.optional(),
	basisReason: z.string().trim().max(500).default(''),
	/** Trace of the numbers that were shown. */
	expected: z.string().max(64).optional()
});
