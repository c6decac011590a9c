import { z } from 'zod';
import { basis } from '../core/limits/basis';

const place = {
	conditionKey: z.string().min(1).max(200),
	policyVersion: z.number().int().positive(),
	basis,
	reason: z.string().trim().max(1000).default('')
};

/** Deciding the printed limits of one condition. */
export const limitDecisionForm = z.object({
	...place,
	/** Digits as they are to be printed; empty where the machine's stay. */
	minimum: z.string().trim().max(20).default(''),
	maximum: z.string().trim().max(20).default(''),
	/** U of the production tester in the unit of the table; empty where that of the sets holds. */
	testerUncertainty: z.string().trim().max(20).default(''),
	isOutsideIntended: z.boolean().default(false)
});

/** Printing the machine's limits again. */
export const limitTakeBackForm = z.object(place);
