import { normalDensity, normalLowerTail } from './normalDistribution';

const LOG_SQRT_TWO_PI = 0.9189385332046727;

/** Below here tail and density are too near to underflow to be divided. */
const FAR = -37;

/**
 * |z|·Φ(z)/φ(z) far below by the asymptotic series; the first term left out is 105/z⁸, 3e-11 here.
 *
 * Source: Abramowitz and Stegun 1964, 26.2.12.
 */
function farSeries(z: number): number {
	const square = z * z;
	return 1 - (1 - (3 - 15 / square) / square) / square;
}

/** ln Φ(z), finite where Φ itself has underflowed. */
export function logNormalLowerTail(z: number): number {
	if (z > FAR) return Math.log(normalLowerTail(z));
	return -(z * z) / 2 - Math.log(-z) - LOG_SQRT_TWO_PI + Math.log(farSeries(z));
}

/** φ/Φ, the slope of ln Φ, without dividing zero by zero far below. */
export function normalHazard(z: number): number {
	if (z > FAR) return normalDensity(z) / normalLowerTail(z);
	return -z / farSeries(z);
}
