import { expect, it } from 'vitest';
import { logNormalLowerTail } from './logNormalTail';
import { tabulatedLogTail } from './tabulatedLogTail';

it('is within 5e-12 of the logarithm, and the logarithm itself beyond the table', () => {
	let most = 0;
	for (let z = -7.9999; z < 8; z += 0.00117)
		most = Math.max(most, Math.abs(tabulatedLogTail(z) - logNormalLowerTail(z)));
	expect(most).toBeGreaterThan(0);
	expect(most).toBeLessThan(5e-12);
	for (const z of [-40, -8.1, 8, 12]) expect(tabulatedLogTail(z)).toBe(logNormalLowerTail(z));
});
