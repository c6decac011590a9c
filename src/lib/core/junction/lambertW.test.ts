import { expect, it } from 'vitest';
import { lambertWOfExp } from './lambertW';

// SciPy 1.17.1: special.lambertw(exp(x))
it.each([
	[-5, 0.006693000497730993],
	[0, 0.5671432904097838],
	[1, 1],
	[3, 2.207940031569323],
	[20, 17.15756104621555]
])('matches SciPy at e^%f', (x, w) => {
	expect(lambertWOfExp(x) / w).toBeCloseTo(1, 13);
});

it('solves w + ln w = x where e^x overflows or vanishes', () => {
	const w = lambertWOfExp(2000);
	expect(w + Math.log(w)).toBeCloseTo(2000, 10);
	expect(lambertWOfExp(-50) / Math.exp(-50)).toBeCloseTo(1, 12);
	expect(lambertWOfExp(-800)).toBe(0);
});
