import { z } from 'zod';
import { screenedMessages as say } from '../../messages/screened';

/** As many devices as a script may send at once. */
const MOST_DEVICES = 200_000;

const values = z.array(z.number()).min(1).max(MOST_DEVICES);
/** Of the tested and of the limited quantity, in this order. */
const pair = z.tuple([z.number(), z.number()]);

/**
 * What a script asks: devices measured at both conditions, or a summary of them, and the test
 * limits at the first. Numbers in any unit, the same throughout one condition. A misspelt key is
 * refused, because an optional fact would be missing without a word.
 */
export const screenedRequest = z
	.strictObject({
		/** One value a device at the condition that production tests. */
		tested: values.optional(),
		/** The same devices at the condition that is limited. */
		limited: values.optional(),
		/** The wafer lot of each device. */
		groups: z.array(z.union([z.string().min(1).max(100), z.number()])).optional(),
		/** Instead of pairs: moments of the transformed values; without `n` they are taken as known. */
		means: pair.optional(),
		deviations: z.tuple([z.number().positive(), z.number().positive()]).optional(),
		correlation: z.number().min(-1).max(1).optional(),
		n: z.number().int().min(3).max(1e9).nullish(),
		/** Lowest and highest value at the tested condition behind a summary. */
		testedRange: pair.optional(),
		transform: z.enum(['ln', 'identity']).default('ln'),
		/** The value at the limited condition, or tested/limited of each device. */
		quantity: z.enum(['limited', 'ratio']).default('limited'),
		/** Test limits at the tested condition. */
		window: z.strictObject({ low: z.number().optional(), high: z.number().optional() }).optional(),
		/** U of the production tester; a number is an amount in the unit of the tested values. */
		uncertainty: z
			.union([
				z.number().min(0),
				z.strictObject({ absolute: z.number().min(0) }),
				z.strictObject({ relative: z.number().min(0).lt(1) })
			])
			.optional(),
		content: z.number().gt(0).lt(1),
		confidence: z.number().gt(0).lt(1).optional(),
		sides: z.enum(['minimum', 'maximum', 'minimum-and-maximum']).default('minimum-and-maximum')
	})
	.refine(({ tested, means }) => (tested === undefined) !== (means === undefined), {
		message: say.pairsOrMoments()
	});
export type ScreenedRequest = z.infer<typeof screenedRequest>;
