import { engineeringText, withUnit } from './printNumber';

interface Conditions {
	readonly reverseVoltage?: number | undefined;
	readonly secondReverseVoltage?: number | undefined;
	readonly frequency?: number | undefined;
	readonly temperatureCelsius?: number | undefined;
	readonly forwardCurrent?: number | undefined;
	readonly reverseCurrent?: number | undefined;
	readonly pulseDuration?: number | undefined;
	/** In A/s. */
	readonly currentSlope?: number | undefined;
	/** What the template adds: `mounted on FR4`. */
	readonly others?: string;
}

/** `V_R = 4 V, f = 1 MHz, T_j = 25 °C`: what is given, with symbols as plain text. */
export function conditionText(of: Conditions): string {
	return [
		...(of.reverseVoltage === undefined
			? []
			: [`V_R = ${biasText(of.reverseVoltage, of.secondReverseVoltage)}`]),
		...engineering('I_F', of.forwardCurrent, 'A'),
		...engineering('I_R', of.reverseCurrent, 'A'),
		...(of.currentSlope === undefined
			? []
			: [`di_F/dt = ${withUnit(String(of.currentSlope / 1e6), 'A/µs')}`]),
		...engineering('t_p', of.pulseDuration, 's'),
		...(of.others === undefined || of.others === '' ? [] : [of.others]),
		...engineering('f', of.frequency, 'Hz'),
		...(of.temperatureCelsius === undefined
			? []
			: [`T_j = ${temperatureText(of.temperatureCelsius)}`])
	].join(', ');
}

/** `1 V and 28 V` where two biases are compared. */
const biasText = (bias: number, second: number | undefined) =>
	[bias, ...(second === undefined ? [] : [second])]
		.map((value) => withUnit(String(value), 'V'))
		.join(' and ');

const engineering = (symbol: string, value: number | undefined, unit: string): string[] =>
	value === undefined ? [] : [`${symbol} = ${engineeringText(value, unit)}`];

export function temperatureText(celsius: number): string {
	return withUnit(String(celsius), '°C');
}
