import type { LetterSymbol } from '$lib/core/characteristics/symbol';
import type { ReciprocalSquareLine } from '$lib/core/junction/reciprocalSquareLine';
import type { LineSettings } from '$lib/core/junction/reciprocalSquareLine';

/** A number that is read off the line, as it is shown. */
export interface LineResult {
	readonly symbol: LetterSymbol;
	readonly value: string;
	readonly unit: string;
}

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const volts = (value: number) => value.toFixed(3).replace('-', '\u2212');

/** A power of ten in plain sight: `9.96 × 10¹⁵`. */
export function powerOfTen(value: number, figures = 3): string {
	const [digits = '', power = '0'] = value.toExponential(figures - 1).split('e');
	const raised = [...String(Math.abs(Number(power)))].map((digit) => RAISED[Number(digit)]);
	return `${digits}\u00a0×\u00a010${Number(power) < 0 ? '⁻' : ''}${raised.join('')}`;
}

/** What a line says of its junction; concentrations in cm⁻³. A barrier only where one applies. */
export function lineResults(
	line: ReciprocalSquareLine,
	{ junction }: Pick<LineSettings, 'junction'>
): LineResult[] {
	return [
		{
			symbol: { quantity: 'N' },
			value: powerOfTen(line.doping * 1e-6),
			unit: 'cm⁻³'
		},
		{ symbol: { quantity: 'V', subscript: 'i' }, value: volts(line.voltageIntercept), unit: 'V' },
		{ symbol: { quantity: 'V', subscript: 'bi' }, value: volts(line.builtInPotential), unit: 'V' },
		...(junction === 'metal-semiconductor' && line.barrierHeight !== null
			? [
					{
						symbol: { quantity: 'φ', subscript: 'B' },
						value: volts(line.barrierHeight),
						unit: 'V'
					}
				]
			: []),
		{ symbol: { quantity: 'R²' }, value: Number(line.r2.toFixed(5)).toString(), unit: '' }
	];
}
