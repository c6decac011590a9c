import { z } from 'zod';
import { allowance } from './allowance';

export const limitMethod = z.enum(['lots', 'normal', 'order', 'sigma']);
export type LimitMethod = z.infer<typeof limitMethod>;

/** The step a printed limit is rounded to: so many units of the table, or significant figures. */
export const resolution = z.union([
	z.object({ step: z.number().positive() }),
	z.object({ significantFigures: z.number().int().min(1).max(8) })
]);
export type Resolution = z.infer<typeof resolution>;

/** Drift over life: the same share on both sides, or an allowance for each of them. */
export const drift = z.union([
	z.number().min(0).lt(1),
	z.object({ minimum: allowance.optional(), maximum: allowance.optional() })
]);
export type Drift = z.infer<typeof drift>;

/** What is done with the systematic uncertainty that the sets state. */
export const uncertaintyTreatment = z.enum(['outwards', 'not-added']);

/** How a limit is computed. Versioned: what uses a policy keeps the version it used. */
export const limitPolicy = z.object({
	name: z.string().min(1).max(80),
	method: limitMethod,
	/** P: the share of devices promised to lie on the right side. */
	content: z.number().gt(0).lt(1),
	/** γ: how sure the promise is. */
	confidence: z.number().gt(0).lt(1),
	/** Each limit on its own (confidence shared when both are promised), or content between both. */
	tails: z.enum(['each', 'both']),
	/** Whether each bias is promised on its own, or the content along the entire curve (`lots`). */
	span: z.enum(['each-bias', 'whole-curve']).default('each-bias'),
	/** Multiples of the standard deviation, for `sigma` only. */
	k: z.number().positive().optional(),
	minimumLots: z.number().int().min(1),
	minimumDevices: z.number().int().min(2),
	/** Drift allowance over life, outwards. */
	drift: drift.default(0),
	uncertaintyTreatment: uncertaintyTreatment.default('outwards'),
	/** r of the guard band r·U that a test limit keeps from the printed one; none, unless given. */
	guardBand: z.number().min(0).max(10).optional(),
	resolution,
	/** The step of test limits; one decimal or figure finer than the printed ones, unless given. */
	testResolution: resolution.optional()
});
export type LimitPolicy = z.infer<typeof limitPolicy>;

/** A stored version of a policy, as limits name it. */
export interface PolicyVersion {
	readonly id: number;
	readonly policy: string;
	readonly number: number;
	readonly rules: LimitPolicy;
}
