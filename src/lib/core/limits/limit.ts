import { z } from 'zod';
import { condition } from '../characteristics/condition';
import { basis } from './basis';

/** One step from devices to the printed number: set like a line of a bill. */
export const derivationStep = z.object({
	name: z.string(),
	/** How it was done, with the source of the method. */
	method: z.string(),
	value: z.number().nullable(),
	unit: z.string(),
	/** The value as a reader can redo it: enough digits, engineering unit. */
	text: z.string()
});
export type DerivationStep = z.infer<typeof derivationStep>;

/** The limit of the production test behind a printed one. */
export const testLimitValue = z.object({
	/** SI */
	value: z.number(),
	text: z.string(),
	derivation: z.array(derivationStep)
});
export type TestLimit = z.infer<typeof testLimitValue>;

/** How many devices pass the test. */
export const testYield = z.object({
	/** Share, from the normal shape of all devices together. */
	predicted: z.number(),
	/** Of the stored devices; `null` where more fail than are stored one by one. */
	passed: z.number().int().nullable(),
	of: z.number().int()
});
export type TestYield = z.infer<typeof testYield>;

/** What the machine said, and beside it what an engineer decided. */
export const limitValue = z.object({
	/** Before drift, uncertainty and rounding; SI. */
	raw: z.number(),
	/** As printed; SI. */
	printed: z.number(),
	/** As printed, in the unit of the table, digits kept: "12.50". */
	text: z.string(),
	derivation: z.array(derivationStep),
	/** Where every device is tested, or the policy states a guard band. */
	test: testLimitValue.optional(),
	/** Distance from the mean in standard deviations of the transformed values. */
	factor: z.number().optional()
});
export type LimitValue = z.infer<typeof limitValue>;

/** Minimum, typical and maximum of a characteristic at one condition. */
export const limitRow = z.object({
	characteristic: z.string(),
	condition,
	conditionKey: z.string(),
	/** The unit the texts are in, and its size in SI. */
	unit: z.string(),
	unitScale: z.number().positive(),
	minimum: limitValue.nullable(),
	typical: limitValue.nullable(),
	maximum: limitValue.nullable(),
	basis,
	/** Why a minimum or maximum is missing; empty when both are there. */
	refusals: z.array(z.string()),
	warnings: z.array(z.string()),
	/** Devices needed a side where the method refuses so few. */
	requiredSampleSize: z.number().int().optional(),
	/** Of the test limits, where there are some. */
	testYield: testYield.optional(),
	sampleSize: z.number().int(),
	independentLots: z.number().int(),
	policyVersion: z.number().int(),
	/** Hash of everything the row depends on: the trace from a printed number to its devices. */
	inputHash: z.string(),
	engineVersion: z.string()
});
export type LimitRow = z.infer<typeof limitRow>;
