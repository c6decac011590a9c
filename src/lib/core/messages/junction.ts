import type { ParameterName } from '../junction/capacitanceFitResult';
import { inEngineeringUnits } from '../units/engineering';

const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

const farads = (value: number) => inEngineeringUnits(value, 'F', 4);
const percent = (share: number) => `${Number((share * 100).toPrecision(2))}\u00a0%`;

/** How the parameters of the law are called in sentences. */
const PARAMETER_NAMES = {
	zeroBiasCapacitance: 'C_j0',
	junctionPotential: 'V_j',
	gradingExponent: 'M',
	caseCapacitance: 'C_case'
} as const satisfies Record<ParameterName, string>;

export const junctionMessages = {
	notASweep: () => 'The body is not JSON.',
	lengthsDiffer: (biases: number, capacitances: number) =>
		`${plural(biases, 'bias', 'biases')} and ${plural(capacitances, 'capacitance')}: one capacitance belongs to each bias.`,
	notPositive: (value: number) => `A capacitance must be above zero, got ${value}.`,
	fewBiases: (required: number, actual: number) =>
		`At least ${required} different biases are needed to fit ${plural(required, 'parameter')}, got ${actual}. Send more, or fix gradingExponent, junctionPotential or caseCapacitance.`,
	signTurned: () =>
		'The capacitance does not fall from the lowest bias to the highest. Reverse bias is positive here: turn the sign of the biases.',
	forwardBeyond: (bias: number, potential: number) =>
		`${bias} V is forward of the largest junction potential that is tried, ${potential} V. Reverse bias is positive here.`,
	potentialBelowForward: (deepest: number) =>
		`V_j must lie above the deepest forward bias, ${deepest} V.`,
	caseTooLarge: (smallest: number) =>
		`The case must lie below the smallest reading, ${farads(smallest)}.`,
	windowCrossed: () => 'The lower end of the window must lie below its upper end.',
	windowTooNarrow: (low: number, high: number, inside: number) =>
		`A line needs at least 3 different biases between ${low} V and ${high} V, got ${inside}.`,

	notConverged: () => 'The fit did not converge; its parameters are where it stopped.',
	notIdentifiable: () =>
		'The readings don’t tell the parameters apart. Fix M or C_case, or measure a wider range of bias.',
	boundHit: (name: ParameterName, value: number) =>
		`${PARAMETER_NAMES[name]} stands at its bound, ${Number(value.toPrecision(4))}; it has no standard error, and the others hold only with it there.`,
	noSpareReadings: (parameters: number) =>
		`As many readings as parameters (${parameters}): nothing is left over for standard errors.`,
	poorlyKnown: (name: ParameterName, share: number) =>
		`${PARAMETER_NAMES[name]} is known to ±${percent(share)} (one standard error) only.`,
	notOneLaw: (rms: number, largest: number, bias: number) =>
		`The readings don’t follow one power law: the residuals (${percent(rms)} rms) run in a pattern, ${percent(largest)} at most, at ${bias} V. Use the readings themselves, or a narrower range.`,
	largeResiduals: (rms: number, largest: number, bias: number) =>
		`The readings lie ${percent(rms)} (rms) from the law, ${percent(largest)} at most, at ${bias} V.`,

	missingForLine: (names: readonly string[]) =>
		`Without ${names.join(' and ')} there is no 1/C² line and no doping profile.`,
	temperatureTaken: (kelvin: number) => `No temperature was sent; ${kelvin} K was taken.`,
	junctionTaken: () =>
		'The kind of junction was not said; a metal on a semiconductor was taken (kT/q, not 2kT/q).',
	noBarrierOfPn: () => 'A p–n junction has no barrier height of a metal.',
	noBarrierWithoutStates: () =>
		'Without effectiveDensityOfStates (N_C for n-type, N_V for p-type) there is no barrier height.',
	degenerate: () =>
		'The doping is above the density of states: the barrier height of a nondegenerate semiconductor doesn’t hold.',
	lineNotRising: () =>
		'1/C² does not rise with reverse bias inside the window; no doping can be read from it.',
	noBuiltInPotential: (value: number) =>
		`The built-in potential comes out at ${Number(value.toPrecision(3))} V, which no junction has: the doping isn’t uniform, or the case is not right.`,
	lineBends: (share: number, low: number, high: number) =>
		`1/C² bends by ${percent(Math.abs(share))} of its span between ${low} V and ${high} V: one doping does not describe it. Choose another window, or read the profile.`,
	profileGaps: (count: number) =>
		`${plural(count, 'interval')} of bias ${count === 1 ? 'has' : 'have'} no concentration, because 1/C² doesn’t rise there.`,
	noChargeWithoutZero: () =>
		'No reading stands at 0 V; charge and energy from 0 V on can’t be given.'
} as const;
