import type { Transform } from '../distributions/summary';

/**
 * The mean of transformed values as a derivation prints it: ln of pF is a number people recognise,
 * ln of F is not. A change of unit moves the mean of a logarithm.
 */
export function meanInTableUnit(mean: number, transform: Transform, unitScale: number): number {
	switch (transform) {
		case 'identity':
			return mean / unitScale;
		case 'ln':
			return mean - Math.log(unitScale);
		case 'log10':
			return mean - Math.log10(unitScale);
		default:
			return transform satisfies never;
	}
}

/** A deviation of transformed values: a change of unit leaves that of a logarithm alone. */
export function deviationInTableUnit(
	deviation: number,
	transform: Transform,
	unitScale: number
): number {
	return transform === 'identity' ? deviation / unitScale : deviation;
}
