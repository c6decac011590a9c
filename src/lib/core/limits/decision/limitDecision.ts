import { z } from 'zod';

/** What the machine printed when somebody decided otherwise. */
export const machineTexts = z.object({
	minimum: z.string().nullable(),
	typical: z.string().nullable(),
	maximum: z.string().nullable(),
	/** Hash of the limit row. */
	inputHash: z.string()
});

/** Printed limits that a person decided, beside what the machine said. */
export const limitDecision = z.object({
	/** Digits as they are printed, in `unit`; `null` where the machine's stay. */
	minimum: z.string().nullable(),
	maximum: z.string().nullable(),
	unit: z.string(),
	unitScale: z.number().positive(),
	/** Expanded uncertainty U of the production tester in SI; `null` where that of the sets holds. */
	testerUncertainty: z.number().nonnegative().nullable(),
	/** More stored devices lie outside than the basis allows, and the reason says why. */
	isOutsideIntended: z.boolean(),
	machine: machineTexts
});
export type LimitDecision = z.infer<typeof limitDecision>;

/** A decision that stands, with who made it, when and why. */
export interface DecidedLimit {
	readonly decision: LimitDecision;
	readonly reason: string;
	/** Name of the person. */
	readonly by: string;
	/** ISO 8601, UTC */
	readonly at: string;
}
