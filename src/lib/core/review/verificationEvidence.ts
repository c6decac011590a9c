import { z } from 'zod';

const three = <T extends z.ZodType>(of: T) =>
	z.object({ minimum: of.nullable(), typical: of.nullable(), maximum: of.nullable() });

/** How one printed number stands against the second route. */
export const routeCheck = z.object({
	/** Value of the second route before rounding, in the unit of the row. */
	value: z.number(),
	/** The same with one digit more than is printed. */
	text: z.string(),
	/** (printed − second route) / second route in %, rounding included. */
	deviationPercent: z.number(),
	agrees: z.boolean()
});
export type RouteCheck = z.infer<typeof routeCheck>;

/** Devices beyond a printed limit. */
export const outsideCount = z.object({
	count: z.number().int().nonnegative(),
	/** How many the basis allows. */
	allowed: z.number().int().nonnegative(),
	/** How many a sample of this size shows on average when the promise just holds. */
	expected: z.number().nonnegative()
});
export type OutsideCount = z.infer<typeof outsideCount>;

export const deviceOutside = z.object({
	lot: z.string(),
	wafer: z.string(),
	device: z.string(),
	side: z.enum(['minimum', 'maximum']),
	/** In the unit of the row. */
	value: z.number(),
	/** (value − limit) / limit in %. */
	beyondPercent: z.number()
});
export type DeviceOutside = z.infer<typeof deviceOutside>;

/** One lot's devices at this condition, in the unit of the row. */
export const lotRange = z.object({
	lot: z.string(),
	devices: z.number().int().positive(),
	lowest: z.number(),
	lowerQuartile: z.number(),
	median: z.number(),
	upperQuartile: z.number(),
	highest: z.number(),
	/** Values beyond a printed limit, at most a dozen of them. */
	outside: z.array(z.number())
});
export type LotRange = z.infer<typeof lotRange>;

/** What the second route found, or why it could not look. */
export const computedEvidence = z.discriminatedUnion('status', [
	z.object({ status: z.literal('pending') }),
	z.object({ status: z.literal('refused'), reason: z.string() }),
	z.object({
		status: z.literal('done'),
		devices: z.number().int(),
		independentLots: z.number().int(),
		checks: three(routeCheck),
		outside: z.object({ minimum: outsideCount.nullable(), maximum: outsideCount.nullable() }),
		/** Furthest out first, at most a hundred. */
		devicesOutside: z.array(deviceOutside),
		lots: z.array(lotRange)
	})
]);
export type ComputedEvidence = z.infer<typeof computedEvidence>;

export const rowChange = z.enum(['same', 'moved', 'tightened', 'loosened', 'added', 'removed']);
export type RowChange = z.infer<typeof rowChange>;

/** The same row in the release before. */
export const previousRow = z.object({
	version: z.string(),
	values: three(z.object({ text: z.string(), changePercent: z.number().nullable() })),
	changes: three(rowChange)
});
export type PreviousRow = z.infer<typeof previousRow>;

/**
 * All that a row of the verification sheet shows. What was printed stands here as it was frozen, so
 * that the sheet needs nothing else.
 */
export const verificationEvidence = z.object({
	kind: z.enum(['capacitance', 'characteristic', 'rating', 'struck out', 'text']),
	/** Rows of one group stand under one head. */
	group: z.string(),
	groupConditions: z.string(),
	/** What the row is named by within its group: a bias, a symbol, a place in the text. */
	label: z.string(),
	unit: z.string(),
	printed: three(z.string()),
	basis: z.string().nullable(),
	/** Conditions, the person and reason behind a rating, or the text with its digits. */
	note: z.string(),
	/** Digits that people typed into a text. */
	digits: z.array(z.string()),
	/** `null` for what no measurement stands behind. */
	computed: computedEvidence.nullable(),
	previous: previousRow.nullable(),
	risk: z.enum(['pending', 'low', 'high']),
	/** Why a person has to look at this row by itself; empty at low risk. */
	concerns: z.array(z.string())
});
export type VerificationEvidence = z.infer<typeof verificationEvidence>;
