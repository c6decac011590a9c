import { z } from 'zod';
import { basis } from '../basis';
import { limitMethod } from '../policy';

/** Which limits are promised at once. */
export const promisedSides = z.enum(['minimum', 'maximum', 'minimum-and-maximum']);
export type PromisedSides = z.infer<typeof promisedSides>;

/** What may differ from the stored policy; what is left out stays as the policy has it. */
export const whatIfChange = z.object({
	content: z.number().gt(0).lt(1).optional(),
	confidence: z.number().gt(0).lt(1).optional(),
	method: limitMethod.optional(),
	tails: z.enum(['each', 'both']).optional(),
	sides: promisedSides.optional(),
	/** What stands behind the limits. */
	basis: basis.exclude(['typical']).optional(),
	/** Drift over life as a share, on both sides. */
	drift: z.number().min(0).lt(1).optional(),
	/** r of the guard band r·U; with it, test limits are answered. */
	guardBand: z.number().min(0).max(10).optional(),
	/** The wafer lots that stay in, by name; all of them, unless given. */
	lots: z.array(z.string().min(1).max(80)).max(1000).optional()
});
export type WhatIfChange = z.infer<typeof whatIfChange>;

/** What somebody asks of stored distributions without saving: the limits of one temperature. */
export const whatIfRequest = z.object({
	/** Id of the stored policy version it is compared with; the first policy, unless given. */
	policy: z.number().int().positive().optional(),
	/** The basis of the stored limits; `characterized`, unless given. */
	basis: basis.optional(),
	temperatureCelsius: z.number(),
	/** Hz */
	frequency: z.number().positive().optional(),
	/** Key of the condition whose devices are drawn, like `T=25;f=1000000;VR=4`. */
	at: z.string().max(200).optional(),
	change: whatIfChange
});
export type WhatIfRequest = z.infer<typeof whatIfRequest>;
