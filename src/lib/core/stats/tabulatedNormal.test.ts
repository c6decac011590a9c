import { expect, it } from 'vitest';
import { normalLowerTail } from './normalDistribution';
import { tabulatedLowerTail } from './tabulatedNormal';

it('is within 2e-9 of the probability everywhere', () => {
	let most = 0;
	for (let x = -9; x <= 9; x += 0.00137)
		most = Math.max(most, Math.abs(tabulatedLowerTail(x) - normalLowerTail(x)));
	expect(most).toBeGreaterThan(0);
	expect(most).toBeLessThan(2e-9);
});

it('meets the probability on its points, and never falls', () => {
	for (const x of [-3, -1.5, 0, 0.25, 2])
		expect(tabulatedLowerTail(x)).toBeCloseTo(normalLowerTail(x), 15);
	let before = 0;
	for (let x = -8; x <= 8; x += 0.0011) {
		const value = tabulatedLowerTail(x);
		expect(value).toBeGreaterThanOrEqual(before);
		before = value;
	}
});

it('is certain far out', () => {
	expect(tabulatedLowerTail(-Infinity)).toBe(0);
	expect(tabulatedLowerTail(Infinity)).toBe(1);
});
