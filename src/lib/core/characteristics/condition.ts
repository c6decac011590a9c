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
	reverseVoltage: z.number().optional()
});
export type Condition = z.infer<typeof condition>;

/** The canonical text of a condition, by which tables are keyed: `T=25;f=1000000;VR=4`. */
export function conditionKey(at: Condition): string {
	return [
		`T=${at.temperatureCelsius}`,
		...(at.frequency === undefined ? [] : [`f=${at.frequency}`]),
		...(at.reverseVoltage === undefined ? [] : [`VR=${at.reverseVoltage}`])
	].join(';');
}
