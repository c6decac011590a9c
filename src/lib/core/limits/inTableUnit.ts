import type { Distribution } from '../distributions/summary';

/** Mean and spread of the transformed values, with the values in the unit of the table. */
export interface TransformedMoments {
	readonly mean: number;
	readonly standardDeviation: number;
}

/**
 * The moments as a derivation prints them: ln of pF is a number people recognise, ln of F is not.
 * A change of unit moves the mean of a logarithm and leaves its spread alone.
 */
export function inTableUnit(
	{ transform, mean, standardDeviation }: Distribution,
	unitScale: number
): TransformedMoments {
	switch (transform) {
		case 'identity':
			return { mean: mean / unitScale, standardDeviation: standardDeviation / unitScale };
		case 'ln':
			return { mean: mean - Math.log(unitScale), standardDeviation };
		case 'log10':
			return { mean: mean - Math.log10(unitScale), standardDeviation };
		default:
			return transform satisfies never;
	}
}
