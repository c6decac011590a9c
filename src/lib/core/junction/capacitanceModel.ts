/**
 * A junction whose capacitance follows one power law, in parallel with its package:
 * C(V_R) = C_case + C_j0 (1 + V_R/V_j)^(−M). SI units; reverse bias is positive.
 */
export interface CapacitanceModel {
	readonly zeroBiasCapacitance: number;
	readonly junctionPotential: number;
	readonly gradingExponent: number;
	readonly caseCapacitance: number;
}

/** Capacitance of the model in F at a reverse bias in V; NaN beyond −V_j, where there is none. */
export function modelCapacitance(model: CapacitanceModel, bias: number): number {
	const { zeroBiasCapacitance, junctionPotential, gradingExponent, caseCapacitance } = model;
	const ratio = 1 + bias / junctionPotential;
	if (!(ratio > 0)) return NaN;
	return caseCapacitance + zeroBiasCapacitance * ratio ** -gradingExponent;
}

/** (u^a − 1)/a, and its limit ln u at a = 0, without cancellation between. */
function powerIntegral(u: number, a: number): number {
	const log = Math.log(u);
	return a === 0 ? log : Math.expm1(a * log) / a;
}

/** Charge ∫₀^V C dv of the model in C. */
export function modelCharge(model: CapacitanceModel, bias: number): number {
	const { zeroBiasCapacitance, junctionPotential, gradingExponent, caseCapacitance } = model;
	const u = 1 + bias / junctionPotential;
	return (
		caseCapacitance * bias +
		zeroBiasCapacitance * junctionPotential * powerIntegral(u, 1 - gradingExponent)
	);
}

/** Energy ∫₀^V v·C dv of the model in J. */
export function modelEnergy(model: CapacitanceModel, bias: number): number {
	const { zeroBiasCapacitance, junctionPotential, gradingExponent, caseCapacitance } = model;
	const u = 1 + bias / junctionPotential;
	const moment = powerIntegral(u, 2 - gradingExponent) - powerIntegral(u, 1 - gradingExponent);
	return (
		(caseCapacitance * bias * bias) / 2 +
		zeroBiasCapacitance * junctionPotential * junctionPotential * moment
	);
}
