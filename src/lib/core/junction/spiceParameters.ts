import { BOLTZMANN, ELEMENTARY_CHARGE } from './constants';

/** The junction part of the public Berkeley diode model. SI units; T in K. */
export interface SpiceDiode {
	readonly saturationCurrent: number;
	readonly emission: number;
	readonly seriesResistance: number;
	readonly zeroBiasCapacitance: number;
	readonly junctionPotential: number;
	readonly gradingExponent: number;
	readonly forwardCoefficient: number;
	readonly transitTime: number;
	readonly bandGap: number;
	readonly temperatureExponent: number;
	readonly breakdownVoltage?: number;
	readonly breakdownCurrent: number;
}

/** The model's own defaults (IS, N, RS, CJO, VJ, M, FC, TT, EG, XTI, IBV). Source: SPICE 3 manual, from memory. */
export const SPICE_DEFAULTS: SpiceDiode = {
	saturationCurrent: 1e-14,
	emission: 1,
	seriesResistance: 0,
	zeroBiasCapacitance: 0,
	junctionPotential: 1,
	gradingExponent: 0.5,
	forwardCoefficient: 0.5,
	transitTime: 0,
	bandGap: 1.11,
	temperatureExponent: 3,
	breakdownCurrent: 1e-3
};

/** The temperature at which the model's pieces were fitted by its authors, in K. */
const REFERENCE = 300.15;

/** The model's band gap of silicon in eV, whatever the material. */
const bandGapOf = (temperature: number) =>
	1.16 - (7.02e-4 * temperature * temperature) / (temperature + 1108);

/** The part of VJ that moves with temperature. */
function potentialShift(temperature: number): number {
	const vt = (BOLTZMANN * temperature) / ELEMENTARY_CHARGE;
	const atTemperature = -bandGapOf(temperature) / (2 * vt);
	const atReference = (1.1150877 * ELEMENTARY_CHARGE) / (2 * BOLTZMANN * REFERENCE);
	return -2 * vt * (1.5 * Math.log(temperature / REFERENCE) + atTemperature + atReference);
}

/** The junction potential carried to the model's reference temperature. */
export function referencePotential(diode: SpiceDiode, nominal: number): number {
	return (diode.junctionPotential - potentialShift(nominal)) / (nominal / REFERENCE);
}

/** VJ(T) in V. Source: SPICE 3 diode model, checked against ngspice 39. */
export function spicePotential(diode: SpiceDiode, temperature: number, nominal: number): number {
	return (
		potentialShift(temperature) + (temperature / REFERENCE) * referencePotential(diode, nominal)
	);
}

/** What CJO(T) is proportional to. */
export function growthAt(diode: SpiceDiode, temperature: number, nominal = temperature): number {
	const reference = referencePotential(diode, nominal);
	const potential = spicePotential(diode, temperature, nominal);
	const swelling = 4e-4 * (temperature - REFERENCE) - (potential - reference) / reference;
	return 1 + diode.gradingExponent * swelling;
}

/** CJO(T) in F. */
export function spiceZeroBiasCapacitance(
	diode: SpiceDiode,
	temperature: number,
	nominal: number
): number {
	const growth = growthAt(diode, temperature, nominal) / growthAt(diode, nominal);
	return diode.zeroBiasCapacitance * growth;
}

/**
 * Depletion capacitance of the model in F at a reverse bias in V (negative when forward): the power
 * law, continued by its tangent above FC·VJ.
 */
export function spiceCapacitance(
	diode: SpiceDiode,
	bias: number,
	{ temperature, nominal }: { readonly temperature: number; readonly nominal: number }
): number {
	const potential = spicePotential(diode, temperature, nominal);
	const zeroBias = spiceZeroBiasCapacitance(diode, temperature, nominal);
	const { gradingExponent: m, forwardCoefficient: fc } = diode;
	const forward = -bias;
	if (forward < fc * potential) return zeroBias * (1 - forward / potential) ** -m;
	const tangent = 1 - fc * (1 + m) + (m * forward) / potential;
	return (zeroBias / (1 - fc) ** (1 + m)) * tangent;
}
