import { thermalVoltage } from './constants';
import { lambertWOfExp } from './lambertW';

/** A forward diode: I = I_s (exp((V − I R_s)/(n kT/q)) − 1). */
export interface ForwardModel {
	readonly ideality: number;
	/** In A. */
	readonly saturationCurrent: number;
	/** In Ω. */
	readonly seriesResistance: number;
}

/** Current in A at a voltage in V and a temperature in K, explicit through Lambert's W. */
export function forwardCurrent(
	{ ideality, saturationCurrent, seriesResistance }: ForwardModel,
	voltage: number,
	temperature: number
): number {
	const scale = ideality * thermalVoltage(temperature);
	if (seriesResistance === 0) return saturationCurrent * Math.expm1(voltage / scale);
	const drop = saturationCurrent * seriesResistance;
	const logArgument = Math.log(drop / scale) + (voltage + drop) / scale;
	return (scale / seriesResistance) * lambertWOfExp(logArgument) - saturationCurrent;
}

/** Voltage in V at a current in A and a temperature in K. */
export function forwardVoltage(
	{ ideality, saturationCurrent, seriesResistance }: ForwardModel,
	current: number,
	temperature: number
): number {
	const junction = ideality * thermalVoltage(temperature) * Math.log1p(current / saturationCurrent);
	return junction + current * seriesResistance;
}
