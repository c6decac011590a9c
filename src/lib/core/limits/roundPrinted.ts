import type { Resolution } from './policy';

export type RoundingDirection = 'down' | 'up' | 'nearest';

export interface PrintedNumber {
	readonly value: number;
	/** The digits as they are printed, zeros at the end kept. */
	readonly text: string;
}

/** digits × 10^exponent, without loss. */
interface Decimal {
	readonly digits: bigint;
	readonly exponent: number;
}

/**
 * Rounds at the resolution, in decimal arithmetic on the shortest digits of the number: 0.7 is
 * seven steps of 0.1, though 0.7/0.1 in binary is 6.999999999999999. Down is towards −∞, up
 * towards +∞; nearest takes a half away from zero.
 */
export function roundPrinted(
	value: number,
	resolution: Resolution,
	direction: RoundingDirection
): PrintedNumber {
	const decimal = toDecimal(value);
	const step = 'step' in resolution ? toDecimal(resolution.step) : stepOf(decimal, resolution);
	const exponent = Math.min(decimal.exponent, step.exponent);
	const numerator = decimal.digits * 10n ** BigInt(decimal.exponent - exponent);
	const denominator = step.digits * 10n ** BigInt(step.exponent - exponent);
	const rounded = {
		digits: divide(numerator, denominator, direction) * step.digits,
		exponent: step.exponent
	};
	// 9.996 up to three figures is 10.0, not 10.00: the new decade takes a digit.
	const shown =
		'step' in resolution ? -step.exponent : -stepOf(trimmed(rounded), resolution).exponent;
	const text = toText(rounded, Math.max(0, shown));
	return { value: Number(text), text };
}

/** The resolution in words, at the head of a derivation's line. */
export function resolutionText(resolution: Resolution, unit: string): string {
	if ('step' in resolution) return `Steps of ${resolution.step}\u00a0${unit}`;
	const figures = resolution.significantFigures;
	return `${figures} significant ${figures === 1 ? 'figure' : 'figures'}`;
}

function toDecimal(value: number): Decimal {
	const [mantissa = '0', power = '0'] = value.toExponential().split('e');
	const [whole = '0', fraction = ''] = mantissa.split('.');
	return { digits: BigInt(whole + fraction), exponent: Number(power) - fraction.length };
}

function stepOf(
	value: Decimal,
	{ significantFigures }: { readonly significantFigures: number }
): Decimal {
	const count = String(value.digits < 0n ? -value.digits : value.digits).length;
	return { digits: 1n, exponent: value.exponent + count - significantFigures };
}

function trimmed({ digits, exponent }: Decimal): Decimal {
	return digits !== 0n && digits % 10n === 0n
		? trimmed({ digits: digits / 10n, exponent: exponent + 1 })
		: { digits, exponent };
}

function divide(numerator: bigint, denominator: bigint, direction: RoundingDirection): bigint {
	const quotient = numerator / denominator;
	const rest = numerator % denominator;
	if (rest === 0n) return quotient;
	const away = numerator < 0n ? -1n : 1n;
	switch (direction) {
		case 'down':
			return numerator < 0n ? quotient - 1n : quotient;
		case 'up':
			return numerator < 0n ? quotient : quotient + 1n;
		case 'nearest':
			return 2n * (rest < 0n ? -rest : rest) >= denominator ? quotient + away : quotient;
		default:
			return direction satisfies never;
	}
}

function toText({ digits, exponent }: Decimal, decimals: number): string {
	const shift = exponent + decimals;
	const scaled = shift >= 0 ? digits * 10n ** BigInt(shift) : digits / 10n ** BigInt(-shift);
	const all = String(scaled < 0n ? -scaled : scaled).padStart(decimals + 1, '0');
	const whole = all.slice(0, all.length - decimals);
	const sign = scaled < 0n ? '-' : '';
	return decimals === 0 ? sign + whole : `${sign}${whole}.${all.slice(all.length - decimals)}`;
}
