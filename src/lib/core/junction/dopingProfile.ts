import { ELEMENTARY_CHARGE, VACUUM_PERMITTIVITY } from './constants';

export interface DepletionSettings {
	/** Junction area in m². */
	readonly area: number;
	readonly relativePermittivity: number;
}

/** Width x_d = ε_s A/C of the depletion layer in m, from a junction capacitance (case taken off). */
export function depletionWidth(
	capacitance: number,
	{ area, relativePermittivity }: DepletionSettings
): number {
	return (relativePermittivity * VACUUM_PERMITTIVITY * area) / capacitance;
}

/** One point of a doping profile: depth in m, net concentration in m⁻³. */
export interface ProfilePoint {
	readonly depth: number;
	readonly concentration: number;
}

/**
 * Net doping against depth, N = 2/(q ε_s A² d(1/C²)/dV_R) between neighbouring points of a sweep,
 * at the width that belongs to the mean of their 1/C². Where 1/C² does not rise there is no
 * concentration, and the interval is left out.
 *
 * Source: Hilibrand and Gold 1960; Sze 1981, section 2.3.
 *
 * @param biases - reverse biases in V, ascending
 */
export function dopingProfile(
	biases: ArrayLike<number>,
	capacitances: ArrayLike<number>,
	settings: DepletionSettings,
	caseCapacitance = 0
): ProfilePoint[] {
	const permittivity = settings.relativePermittivity * VACUUM_PERMITTIVITY;
	const numerator = 2 / (ELEMENTARY_CHARGE * permittivity * settings.area ** 2);
	const profile: ProfilePoint[] = [];
	let previous: { bias: number; inverseSquare: number } | undefined;
	for (let i = 0; i < biases.length; i++) {
		const junctionCapacitance = capacitances[i]! - caseCapacitance;
		if (!(junctionCapacitance > 0)) continue;
		const point = { bias: biases[i]!, inverseSquare: 1 / junctionCapacitance ** 2 };
		if (previous !== undefined) {
			const slope = (point.inverseSquare - previous.inverseSquare) / (point.bias - previous.bias);
			const middle = (point.inverseSquare + previous.inverseSquare) / 2;
			if (slope > 0)
				profile.push({
					depth: depletionWidth(1 / Math.sqrt(middle), settings),
					concentration: numerator / slope
				});
		}
		previous = point;
	}
	return profile;
}
