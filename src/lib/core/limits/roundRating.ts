import { roundInward, type Rounded } from '../units/rounding';
import type { Resolution } from './policy';

/**
 * A rating claims what a device withstands, so it is rounded to claim less: a maximum rating down, a
 * minimum rating up.
 *
 * Source: IEC 60134 (limiting values are not exceeded).
 *
 * @param value in the unit that is printed
 * @example roundRating(93.75, 'maximum', { significantFigures: 2 }) // { value: 93, text: '93' }
 */
export function roundRating(value: number, side: 'minimum' | 'maximum', to: Resolution): Rounded {
	return roundInward(value, side, to);
}
