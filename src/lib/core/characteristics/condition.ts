import { z } from 'zod';

/**
 * Under what a value was measured. The temperature stays in °C as the tester states it: a
 * condition is matched for equality, and 25 °C must not become 298.15 K and back.
 */
export const condition = z.object({
	/** Junction temperature in °C. */
	temperatureCelsius: z.number(),
	/** Measuring frequency in Hz. */
	frequency: z.number().positive().optional(),
	/** Reverse bias in V, positive. */
	reverseVoltage: z.number().optional(),
	/** Second reverse bias in V, where a value compares two: the one a ratio divides by. */
	secondReverseVoltage: z.number().optional(),
	/** Forward current in A, positive. */
	forwardCurrent: z.number().positive().optional(),
	/** Reverse current in A, positive: at which a breakdown voltage is read. */
	reverseCurrent: z.number().positive().optional(),
	/** Duration of the measuring pulse in s. */
	pulseDuration: z.number().positive().optional(),
	/** Rate of fall of the current in A/s, positive: how a junction is switched off. */
	currentSlope: z.number().positive().optional()
});
export type Condition = z.infer<typeof condition>;

/** What the parts of a condition are called in its key, in the order in which they stand there. */
export const CONDITION_KEYS = {
	temperatureCelsius: 'T',
	frequency: 'f',
	reverseVoltage: 'VR',
	secondReverseVoltage: 'VR2',
	forwardCurrent: 'IF',
	reverseCurrent: 'IR',
	pulseDuration: 'tp',
	currentSlope: 'diF'
} as const satisfies Record<keyof Condition, string>;

const PARTS = condition.keyof().options;

/** The canonical text of a condition, by which tables are keyed: `T=25;f=1000000;VR=4`. */
export function conditionKey(at: Condition): string {
	return PARTS.flatMap((part) =>
		at[part] === undefined ? [] : [`${CONDITION_KEYS[part]}=${at[part]}`]
	).join(';');
}
