import { forwardVoltage } from '$lib/core/junction/forwardCurrent';
import type { ForwardModel } from '$lib/core/junction/forwardCurrent';
import type { Random } from './random';

/** Boltzmann's constant in eV/K (CODATA 2018). */
const BOLTZMANN = 8.617333262e-5;
const ROOM = 298.15;

/** How a simulated diode conducts, at 25 °C. */
export interface ElectricalLaw {
	readonly forward: ForwardModel;
	/** Energy in eV by which the saturation current grows with temperature, and the power of T. */
	readonly saturationEnergy: number;
	readonly saturationPower: number;
	/** In A at the rated reverse voltage. */
	readonly leakage: number;
	readonly ratedVoltage: number;
	/** Energy in eV by which leakage grows with temperature; its growth with the fourth root of V. */
	readonly leakageEnergy: number;
	readonly leakageGrowth: number;
	/** In V, and its growth in V/K. */
	readonly breakdown: number;
	readonly breakdownDrift: number;
	/** Radio-frequency series resistance in Ω. */
	readonly seriesResistance: number;
	/** Junction to mounting base, in K/W. */
	readonly thermalResistance: number;
}

/** Standard deviations of one level: relative, but of the breakdown in V. */
export interface ElectricalSpread {
	readonly saturation: number;
	readonly leakage: number;
	readonly breakdown: number;
	readonly resistance: number;
	readonly thermal: number;
}

/** A law that differs from `law` as one lot, wafer or device does from another. */
export function spreadElectrical(
	law: ElectricalLaw,
	by: ElectricalSpread,
	random: Random
): ElectricalLaw {
	const factor = (spread: number) => Math.exp(spread * random.normal());
	const resistance = factor(by.resistance);
	return {
		...law,
		forward: {
			...law.forward,
			saturationCurrent: law.forward.saturationCurrent * factor(by.saturation),
			seriesResistance: law.forward.seriesResistance * resistance
		},
		leakage: law.leakage * factor(by.leakage),
		breakdown: law.breakdown + by.breakdown * random.normal(),
		seriesResistance: law.seriesResistance * resistance,
		thermalResistance: law.thermalResistance * factor(by.thermal)
	};
}

/** The forward law at another temperature. */
export function forwardAt(law: ElectricalLaw, celsius: number): ForwardModel {
	const kelvin = celsius + 273.15;
	return {
		...law.forward,
		saturationCurrent:
			law.forward.saturationCurrent *
			(kelvin / ROOM) ** law.saturationPower *
			arrhenius(law.saturationEnergy, kelvin)
	};
}

/** In V. */
export const forwardVoltageAt = (law: ElectricalLaw, current: number, celsius: number) =>
	forwardVoltage(forwardAt(law, celsius), current, celsius + 273.15);

/** In A, at a reverse voltage. */
export function leakageAt(law: ElectricalLaw, voltage: number, celsius: number): number {
	const growth = law.leakageGrowth * (voltage ** 0.25 - law.ratedVoltage ** 0.25);
	return law.leakage * Math.exp(growth) * arrhenius(law.leakageEnergy, celsius + 273.15);
}

/** In V. */
export const breakdownAt = (law: ElectricalLaw, celsius: number) =>
	law.breakdown + law.breakdownDrift * (celsius - 25);

function arrhenius(energy: number, kelvin: number): number {
	return Math.exp((energy / BOLTZMANN) * (1 / ROOM - 1 / kelvin));
}
