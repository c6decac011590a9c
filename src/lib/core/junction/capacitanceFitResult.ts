import type { CapacitanceModel } from './capacitanceModel';

/** Bounds of the fit: V_j in V, and M. C_case lies between 0 and the smallest reading. */
export const JUNCTION_POTENTIAL_BOUNDS = [0.05, 20] as const;
export const GRADING_EXPONENT_BOUNDS = [0.1, 2.5] as const;

/** The four parameters, in the order in which bulk results hold them. */
export const PARAMETERS = [
	'zeroBiasCapacitance',
	'junctionPotential',
	'gradingExponent',
	'caseCapacitance'
] as const;
export type ParameterName = (typeof PARAMETERS)[number];

/** Parameters held at a value instead of fitted; C_j0 is always fitted. */
export type FixedParameters = Partial<Omit<CapacitanceModel, 'zeroBiasCapacitance'>>;

/** Columns of a bulk result: the parameters, then rms, then flags. */
export const RESULT_WIDTH = 6;
export const RMS = 4;
export const FLAGS = 5;

/** Bits of the flags: 1 << index for a bound hit, then these. */
export const CONVERGED = 16;
export const IDENTIFIABLE = 32;
