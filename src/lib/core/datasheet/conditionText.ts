import { engineeringText, withUnit } from './printNumber';

interface Conditions {
	readonly reverseVoltage?: number | undefined;
	readonly frequency?: number | undefined;
	readonly temperatureCelsius?: number | undefined;
	/** What the template adds: `I_F = 1 A`. */
	readonly others?: string;
}

/** `V_R = 4 V, f = 1 MHz, T_j = 25 °C`: what is given, with symbols as plain text. */
export function conditionText(of: Conditions): string {
	return [
		...(of.reverseVoltage === undefined
			? []
			: [`V_R = ${withUnit(String(of.reverseVoltage), 'V')}`]),
		...(of.others === undefined || of.others === '' ? [] : [of.others]),
		...(of.frequency === undefined ? [] : [`f = ${engineeringText(of.frequency, 'Hz')}`]),
		...(of.temperatureCelsius === undefined
			? []
			: [`T_j = ${temperatureText(of.temperatureCelsius)}`])
	].join(', ');
}

export function temperatureText(celsius: number): string {
	return withUnit(String(celsius), '°C');
}
