import { describe, expect, it } from 'vitest';
import { checkPrinted } from './checkPrinted';

const THREE = { significantFigures: 3 };

describe.each([
	// A minimum is printed at or below the second route, by less than one step.
	['minimum', '12.5', 12.5, true],
	['minimum', '12.5', 12.59, true],
	['minimum', '12.5', 12.61, false],
	['minimum', '12.5', 12.499, false],
	['minimum', '12.5', 12.499999, true],
	// A maximum at or above.
	['maximum', '12.5', 12.41, true],
	['maximum', '12.5', 12.39, false],
	['maximum', '12.5', 12.501, false],
	// A typical value within half a step.
	['typical', '12.5', 12.45, true],
	['typical', '12.5', 12.549, true],
	['typical', '12.5', 12.56, false]
] as const)('a %s printed as %s', (side, printed, value, agrees) => {
	it(`${agrees ? 'agrees' : 'disagrees'} with ${value}`, () => {
		expect(checkPrinted(side, printed, value, THREE).agrees).toBe(agrees);
	});
});

it('knows that a maximum may grow a digit by rounding up', () => {
	expect(checkPrinted('maximum', '10.0', 9.996, THREE).agrees).toBe(true);
});

it('goes by the step of the policy, not by the digits', () => {
	expect(checkPrinted('minimum', '12.5', 12.9, { step: 0.5 }).agrees).toBe(true);
	expect(checkPrinted('minimum', '12.5', 13.1, { step: 0.5 }).agrees).toBe(false);
});

it('shows one digit more than is printed and the deviation in %', () => {
	const check = checkPrinted('minimum', '12.5', 12.55, THREE);
	expect(check.text).toBe('12.55');
	expect(check.deviationPercent).toBeCloseTo((-0.05 / 12.55) * 100, 10);
});
