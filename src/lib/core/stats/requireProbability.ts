import { OutsideDomainError } from './errors';

/**
 * Guards an argument that is a probability, both ends left out: neither certainty has a quantile.
 *
 * @throws {OutsideDomainError} unless 0 < value < 1
 */
export function requireProbability(statistic: string, argument: string, value: number): void {
	if (!(value > 0 && value < 1))
		throw new OutsideDomainError(statistic, `${argument} between 0 and 1`, value);
}
