import type { Resolution } from './policy';

/** The resolution in words, as a derivation's line begins with it. */
export function resolutionText(resolution: Resolution, unit: string): string {
	if ('step' in resolution) return `Steps of ${resolution.step}\u00a0${unit}`;
	const figures = resolution.significantFigures;
	return `${figures} significant ${figures === 1 ? 'figure' : 'figures'}`;
}
