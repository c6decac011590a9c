import { inEngineeringUnits } from '../units/engineering';
import type { Condition } from './condition';

const NO_BREAK_SPACE = '\u00a0';
/** Figures beyond any set value; zeros at the end are not printed. */
const FIGURES = 9;

const PARTS = {
	frequency: ['f', 'Hz'],
	reverseVoltage: ['V_R', 'V'],
	secondReverseVoltage: ['second V_R', 'V'],
	forwardCurrent: ['I_F', 'A'],
	reverseCurrent: ['I_R', 'A'],
	pulseDuration: ['t_p', 's'],
	currentSlope: ['di_F/dt', 'A/s']
} as const satisfies Record<
	Exclude<keyof Condition, 'temperatureCelsius'>,
	readonly [string, string]
>;
const NAMES = [
	'frequency',
	'reverseVoltage',
	'secondReverseVoltage',
	'forwardCurrent',
	'reverseCurrent',
	'pulseDuration',
	'currentSlope'
] as const;

/** `V_R = 60 V, 25 °C`: a condition in words, symbols as plain text. */
export function describeCondition(at: Condition): string {
	return [
		...NAMES.flatMap((name) => {
			const value = at[name];
			const [symbol, unit] = PARTS[name];
			return value === undefined ? [] : [`${symbol} = ${plainly(value, unit)}`];
		}),
		`${String(at.temperatureCelsius).replace('-', '\u2212')}${NO_BREAK_SPACE}°C`
	].join(', ');
}

function plainly(value: number, unit: string): string {
	const figures = Number(value.toPrecision(FIGURES)).toExponential().split('e')[0] ?? '';
	const needed = figures.replace(/[^0-9]/g, '').length;
	const whole = wholeDigits(value);
	return inEngineeringUnits(value, unit, Math.max(needed, whole));
}

/** Digits before the point in engineering notation, so that 60 V is not printed as 6·10 V. */
function wholeDigits(value: number): number {
	if (value === 0) return 1;
	const magnitude = Math.floor(Math.log10(Math.abs(value)) + 1e-12);
	return (((magnitude % 3) + 3) % 3) + 1;
}
