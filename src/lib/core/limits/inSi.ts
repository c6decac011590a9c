import { readDigits } from './digits';

/**
 * Printed digits in SI. A unit that is a power of ten only shifts the point, so that 14.2 pF is
 * 1.42e-11 F to the last bit and not 14.2 × 1e-12.
 */
export function inSi(text: string, unitScale: number): number {
	const exponent = Math.round(Math.log10(unitScale));
	return Number(`1e${exponent}`) === unitScale
		? Number(`${readDigits(text)}e${exponent}`)
		: readDigits(text) * unitScale;
}
