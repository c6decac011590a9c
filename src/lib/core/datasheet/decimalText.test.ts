import { describe, expect, it } from 'vitest';
import {
	compareDecimals,
	deviationPercent,
	NotADecimalError,
	ratioText,
	roundRating,
	shiftDecimal
} from './decimalText';

// By hand, with a pocket calculator: 27.6/30.4 − 1 = −0.09210…, 33.5/30.4 − 1 = 0.10197…
it.each([
	['27.6', '30.4', '−9.2'],
	['33.5', '30.4', '+10.2'],
	['23.5', '25.0', '−6.0'],
	['25.0', '25', '0.0'],
	['10.05', '10', '+0.5'],
	['9.995', '10', '−0.1']
])('%s lies %s from … by %s', (text, reference, deviation) => {
	expect(deviationPercent(text, reference)).toBe(deviation);
});

it('has no deviation from zero', () => {
	expect(deviationPercent('1', '0.00')).toBeNull();
});

// 30.4/2.05 = 14.829…, 2.29/2.05 = 1.1170…, 9.996 rounds up to 10.0.
it.each([
	['30.4', '2.05', '14.8'],
	['2.29', '2.05', '1.12'],
	['2.05', '2.05', '1.00'],
	['9.996', '1', '10.0'],
	['1234', '1', '1234'],
	['0.0123', '1', '0.0123']
])('%s over %s is %s', (text, reference, ratio) => {
	expect(ratioText(text, reference)).toBe(ratio);
});

it('has no ratio with zero on either side', () => {
	expect(ratioText('0', '2')).toBeNull();
	expect(ratioText('2', '0')).toBeNull();
});

describe('shiftDecimal', () => {
	it.each([
		['1.25', 3, '1250'],
		['12.50', -3, '0.01250'],
		['−3', 2, '−300'],
		['0.5', 1, '5']
	])('%s by %i is %s, every digit kept', (text, by, shifted) => {
		expect(shiftDecimal(text, by)).toBe(shifted);
	});
});

// 0.1 + 0.2 is where a binary comparison goes wrong.
it('compares as decimals', () => {
	expect(compareDecimals('0.30', '0.3')).toBe(0);
	expect(compareDecimals('−55', '150')).toBe(-1);
	expect(compareDecimals('10.9', '9.99')).toBe(1);
	expect(compareDecimals('12\u00a0500', '12500')).toBe(0);
});

describe('roundRating', () => {
	it.each([
		['30.7', 1, '30'],
		['−55.5', 1, '−55'],
		['0.7', 0.1, '0.7'],
		['2.3', 0.1, '2.3'],
		['2.39', 0.1, '2.3'],
		['252', 5, '250'],
		['30', 1, '30']
	])('%s in steps of %d claims %s', (text, step, rounded) => {
		expect(roundRating(text, step)).toBe(rounded);
	});
});

it('refuses what is no decimal number', () => {
	expect(() => compareDecimals('thirty', '30')).toThrow(new NotADecimalError('thirty'));
});
