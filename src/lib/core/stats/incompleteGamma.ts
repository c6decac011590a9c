import { OutsideDomainError } from './errors';
import { deviance } from './deviance';
import { stirlingError } from './logGamma';

/** The two regularized incomplete gamma functions P(a, x) and Q(a, x) = 1 − P. */
export interface GammaTails {
	readonly lower: number;
	readonly upper: number;
}

/**
 * x^a e^(−x) / Γ(a+1) as a function of x, in saddle-point form: accurate for a in the millions.
 * Given in two steps because integrals ask for thousands of x at one a.
 */
export function gammaPrefactor(a: number): (x: number) => number {
	const atMode = Math.exp(-stirlingError(a)) / Math.sqrt(2 * Math.PI * a);
	return (x) => (x === 0 ? 0 : atMode * Math.exp(-deviance(a, x)));
}

/**
 * Both tails of the gamma distribution with shape a at x: the power series below the mean,
 * Legendre's continued fraction above it (Abramowitz and Stegun 6.5.29 and 6.5.31), each tail from
 * the side on which it is the small one.
 *
 * @throws {OutsideDomainError} unless a > 0 and x ≥ 0
 */
export function incompleteGamma(a: number, x: number): GammaTails {
	if (!(a > 0)) throw new OutsideDomainError('incompleteGamma', 'a positive shape', a);
	if (!(x >= 0)) throw new OutsideDomainError('incompleteGamma', 'x of at least 0', x);
	if (x === 0) return { lower: 0, upper: 1 };
	if (x === Infinity) return { lower: 1, upper: 0 };
	if (x < a + 1) {
		const lower = gammaPrefactor(a)(x) * powerSeries(a, x);
		return { lower, upper: 1 - lower };
	}
	const upper = gammaPrefactor(a)(x) * a * continuedFraction(a, x);
	return { lower: 1 - upper, upper };
}

function powerSeries(a: number, x: number): number {
	let term = 1;
	let sum = 1;
	for (let n = 1; n < 1e6; n++) {
		term *= x / (a + n);
		sum += term;
		if (term < sum * 1e-17) break;
	}
	return sum;
}

/** 1/(x+1−a − 1(1−a)/(x+3−a − …)), by Lentz's method. */
function continuedFraction(a: number, x: number): number {
	const tiny = 1e-300;
	let b = x + 1 - a;
	let c = 1 / tiny;
	let d = 1 / b;
	let h = d;
	for (let n = 1; n < 1e6; n++) {
		const numerator = -n * (n - a);
		b += 2;
		d = numerator * d + b;
		if (Math.abs(d) < tiny) d = tiny;
		c = b + numerator / c;
		if (Math.abs(c) < tiny) c = tiny;
		d = 1 / d;
		const change = d * c;
		h *= change;
		if (Math.abs(change - 1) < 1e-16) break;
	}
	return h;
}
