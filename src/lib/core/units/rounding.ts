import { aligned, decimalOf, magnitude, numberOf, writeDecimal } from './decimal';
import type { Decimal } from './decimal';

/** What a number is rounded to: multiples of a step, or significant figures. */
export type RoundingStep = { readonly step: number } | { readonly significantFigures: number };

/** A rounded number and how it is printed, trailing zeros kept and with a true minus sign. */
export interface Rounded {
	readonly value: number;
	readonly text: string;
}

type Direction = 'down' | 'up' | 'nearest';

/**
 * Rounds a limit away from the devices: a minimum `down`, a maximum `up`. The arithmetic is decimal
 * and exact, because a binary floor of 0.7 / 0.1 gives 6 and of 2.3 / 0.1 gives 22.
 *
 * @param value in the unit that is printed, as is the step
 * @example roundOutward(12.58, 'down', { significantFigures: 3 }) // { value: 12.5, text: '12.5' }
 */
export function roundOutward(value: number, direction: 'down' | 'up', to: RoundingStep): Rounded {
	return rounded(value, direction, to);
}

/** Rounds a limit towards the devices, as a test limit is: a minimum up, a maximum down. */
export function roundInward(
	value: number,
	limit: 'minimum' | 'maximum',
	to: RoundingStep
): Rounded {
	return rounded(value, limit === 'minimum' ? 'up' : 'down', to);
}

/** Rounds to the nearest; a half goes away from zero (ISO 80000-1, annex B, rule B). */
export function roundNearest(value: number, to: RoundingStep): Rounded {
	return rounded(value, 'nearest', to);
}

function rounded(value: number, direction: Direction, to: RoundingStep): Rounded {
	const exact = decimalOf(value);
	const step = stepFor(exact, to);
	const { a, b, exponent } = aligned(exact, step);
	const result = { digits: quotient(a, b, direction) * b, exponent };
	return { value: numberOf(result), text: writeDecimal(result, decimalsFor(result, step, to)) };
}

function stepFor(value: Decimal, to: RoundingStep): Decimal {
	if ('step' in to) {
		if (!(to.step > 0))
			throw new RangeError(`a rounding step requires more than zero, got ${to.step}`);
		return decimalOf(to.step);
	}
	const { significantFigures } = to;
	if (!Number.isInteger(significantFigures) || significantFigures < 1) {
		throw new RangeError(`rounding requires significant figures from 1, got ${significantFigures}`);
	}
	return { digits: 1n, exponent: (magnitude(value) ?? 0) - (significantFigures - 1) };
}

/** A carry (9.996 to 10.0) gives a figure more before the point and takes one behind it. */
function decimalsFor(result: Decimal, step: Decimal, to: RoundingStep): number {
	if ('step' in to) return Math.max(0, -trimmed(step).exponent);
	const first = magnitude(result);
	return first === undefined ? 0 : Math.max(0, to.significantFigures - 1 - first);
}

/** Without zeros at the end: a step of 0.10 asks for one decimal. */
function trimmed(value: Decimal): Decimal {
	let { digits, exponent } = value;
	while (exponent < 0 && digits % 10n === 0n) {
		digits /= 10n;
		exponent += 1;
	}
	return { digits, exponent };
}

/** a / b as an integer; b is positive. */
function quotient(a: bigint, b: bigint, direction: Direction): bigint {
	const whole = a / b;
	const rest = a % b;
	if (rest === 0n) return whole;
	switch (direction) {
		case 'down':
			return rest < 0n ? whole - 1n : whole;
		case 'up':
			return rest > 0n ? whole + 1n : whole;
		case 'nearest': {
			const twice = 2n * (rest < 0n ? -rest : rest);
			return twice < b ? whole : whole + (rest < 0n ? -1n : 1n);
		}
		default:
			return direction satisfies never;
	}
}
