import { z } from 'zod';
import { GRADING_EXPONENT_BOUNDS, JUNCTION_POTENTIAL_BOUNDS } from './capacitanceFitResult';
import { junctionKind } from './dieFacts';

/** As many readings as one sweep may have: it is fitted while the request waits. */
const MOST_READINGS = 2048;

const readings = z.array(z.number()).min(1).max(MOST_READINGS);

/**
 * One C–V sweep and what is known of its junction, in SI units; reverse bias is positive. A key
 * that is misspelt is refused, because an optional fact would be missing without a word.
 */
export const sweepRequest = z.strictObject({
	/** In V; repeats, both directions and forward points are allowed. */
	biases: readings,
	/** In F, one each bias. */
	capacitances: readings,
	/** Junction area in m². */
	area: z.number().positive().max(1).optional(),
	relativePermittivity: z.number().gt(1).lt(1000).optional(),
	/** In K. */
	temperature: z.number().min(50).max(1000).optional(),
	junction: junctionKind.optional(),
	/** N_C for n-type, N_V for p-type, in m⁻³, at the temperature. */
	effectiveDensityOfStates: z.number().positive().max(1e30).optional(),
	/** Parameters held instead of fitted. */
	fixed: z
		.strictObject({
			gradingExponent: z
				.number()
				.min(GRADING_EXPONENT_BOUNDS[0])
				.max(GRADING_EXPONENT_BOUNDS[1])
				.optional(),
			caseCapacitance: z.number().min(0).optional(),
			junctionPotential: z
				.number()
				.min(JUNCTION_POTENTIAL_BOUNDS[0])
				.max(JUNCTION_POTENTIAL_BOUNDS[1])
				.optional()
		})
		.default({}),
	/** Biases of the 1/C² line in V, both ends included; the reverse biases by default. */
	window: z.tuple([z.number(), z.number()]).optional()
});
export type SweepRequest = z.infer<typeof sweepRequest>;
