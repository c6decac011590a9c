import type { DieFacts } from './dieFacts';

/** The temperature in K that the constants of a material belong to. */
const MATERIAL_TEMPERATURE = 300;

/**
 * Effective density of states in m⁻³ of the band that the carriers of a die are in, at a temperature
 * in K: N_C for n-type, N_V for p-type, growing as T^(3/2). With it the barrier height is that of the
 * metal against that band.
 *
 * Source: Sze 1981, section 1.4.1.
 *
 * @example effectiveDensityOfStates({ conductivity: 'n', material: silicon }, 300) // 2.8e25
 */
export function effectiveDensityOfStates(
	{ conductivity, material }: Pick<DieFacts, 'conductivity' | 'material'>,
	temperature: number
): number {
	const states = conductivity === 'n' ? material.conductionStates : material.valenceStates;
	return states * (temperature / MATERIAL_TEMPERATURE) ** 1.5;
}
