import { expect, it } from 'vitest';
import { OutsideDomainError } from './errors';
import { logGamma, stirlingError } from './logGamma';

// mpmath 1.3.0, 30 digits: loggamma
it.each([
	[0.001, 6.907178885383853],
	[0.5, 0.5723649429247001],
	[1.5, -0.12078223763524522],
	[3, 0.6931471805599453],
	[11.5, 16.292000476567242],
	[100.25, 360.28455963776423],
	[500000.5, 6061182.607640615]
])('matches mpmath at %f', (x, value) => {
	expect(logGamma(x) / value).toBeCloseTo(1, 14);
});

it('refuses zero and below', () => {
	expect(() => logGamma(0)).toThrow(OutsideDomainError);
	expect(() => logGamma(-1.5)).toThrow('logGamma requires a positive number, got -1.5');
});

// Loader 2000, table of δ(n): δ(1) = 0.08106146679532726, δ(15) = 0.005554733551962801
it('has the Stirling errors of Loader', () => {
	expect(stirlingError(1)).toBeCloseTo(0.08106146679532726, 15);
	expect(stirlingError(15)).toBeCloseTo(0.005554733551962801, 16);
});
