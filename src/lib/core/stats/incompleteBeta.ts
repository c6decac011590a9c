import { deviance } from './deviance';
import { OutsideDomainError } from './errors';
import { stirlingError } from './logGamma';

/** The regularized incomplete beta function and its complement. */
export interface BetaTails {
	readonly lower: number;
	readonly upper: number;
}

/** x^a y^b · Γ(a+b)/(Γ(a)Γ(b)), y = 1 − x, in saddle-point form. */
function prefactor(a: number, b: number, x: number, y: number): number {
	const n = a + b;
	const exponent =
		stirlingError(n) -
		stirlingError(a) -
		stirlingError(b) -
		deviance(a, n * x) -
		deviance(b, n * y);
	return Math.exp(exponent) * Math.sqrt((a * b) / (2 * Math.PI * n));
}

/**
 * Both tails of the beta distribution at x, by the continued fraction of Abramowitz and Stegun
 * 26.5.8 on the side where it converges fast. `complement` is 1 − x, given apart because the caller
 * often knows it without cancellation.
 *
 * @throws {OutsideDomainError} unless a > 0, b > 0 and 0 ≤ x ≤ 1
 */
export function incompleteBeta(
	a: number,
	b: number,
	x: number,
	complement: number = 1 - x
): BetaTails {
	if (!(a > 0)) throw new OutsideDomainError('incompleteBeta', 'positive parameters', a);
	if (!(b > 0)) throw new OutsideDomainError('incompleteBeta', 'positive parameters', b);
	if (!(x >= 0 && x <= 1)) throw new OutsideDomainError('incompleteBeta', 'x from 0 to 1', x);
	if (x === 0) return { lower: 0, upper: 1 };
	if (complement === 0) return { lower: 1, upper: 0 };
	const front = prefactor(a, b, x, complement);
	if (x * (a + b + 2) < a + 1) {
		const lower = (front * fraction(a, b, x)) / a;
		return { lower, upper: 1 - lower };
	}
	const upper = (front * fraction(b, a, complement)) / b;
	return { lower: 1 - upper, upper };
}

/** The continued fraction, by Lentz's method; even and odd terms in one round. */
function fraction(a: number, b: number, x: number): number {
	const tiny = 1e-300;
	const away = (value: number) => (Math.abs(value) < tiny ? tiny : value);
	let c = 1;
	let d = 1 / away(1 - ((a + b) * x) / (a + 1));
	let h = d;
	for (let m = 1; m < 1e6; m++) {
		const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
		d = 1 / away(1 + even * d);
		c = away(1 + even / c);
		h *= d * c;
		const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
		d = 1 / away(1 + odd * d);
		c = away(1 + odd / c);
		const change = d * c;
		h *= change;
		if (Math.abs(change - 1) < 1e-16) break;
	}
	return h;
}
