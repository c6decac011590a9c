import type { Transform } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import type { Side } from './allowance';
import { fixed, readDigits, significant } from './digits';
import { deviationInTableUnit, meanInTableUnit } from './inTableUnit';
import type { DerivationStep } from './limit';
import type { Margin } from './methods/method';

/** Centre, deviation and factor as a derivation prints them. */
export interface MarginDigits {
	readonly mean: string;
	readonly deviation: string;
	readonly factor: string;
}

interface Scale {
	readonly transform: Transform;
	readonly unitScale: number;
}

/** The digits of a margin, so many figures each, in the unit of the table. */
export function marginDigits(
	{ centre, deviation, factor }: Margin,
	{ transform, unitScale, figures }: Scale & { readonly figures: number }
): MarginDigits {
	const mean = meanInTableUnit(centre.value, transform, unitScale);
	const spread = deviationInTableUnit(deviation.value, transform, unitScale);
	const isLogarithm = transform !== 'identity';
	return {
		mean: isLogarithm ? fixed(mean, figures) : significant(mean, figures),
		deviation: isLogarithm ? fixed(spread, figures + 1) : significant(spread, figures),
		factor: fixed(factor, figures - 1)
	};
}

/** The transformed limit from the printed digits alone. */
export function sumOf({ mean, deviation, factor }: MarginDigits, side: Side): number {
	const sign = side === 'minimum' ? -1 : 1;
	return readDigits(mean) + sign * readDigits(factor) * readDigits(deviation);
}

export interface MarginStepsOptions {
	readonly distribution: { readonly transform: Transform };
	readonly unitScale: number;
	readonly unit: string;
	readonly symbol: string;
	readonly digits: MarginDigits;
	/** The line that compares the lots, where there is one. */
	readonly compared: readonly DerivationStep[];
}

/** Centre, spread, what the factor rests on, and the factor. */
export function marginSteps(margin: Margin, options: MarginStepsOptions): DerivationStep[] {
	const { digits, unit, symbol, compared, unitScale } = options;
	const { transform } = options.distribution;
	const of = `${TRANSFORMS[transform].prefix}${symbol}`;
	const ofPure = transform === 'identity' ? unit : '';
	const { centre, deviation, components } = margin;
	const inUnit = (value: number) => deviationInTableUnit(value, transform, unitScale);
	return [
		{
			name: `${centre.name} of ${of}`,
			method: `${centre.method} ${symbol} in ${unit}.`,
			value: meanInTableUnit(centre.value, transform, unitScale),
			unit: ofPure,
			text: digits.mean
		},
		{
			name: `${deviation.name} of ${of}`,
			method: deviation.method,
			value: inUnit(deviation.value),
			unit: ofPure,
			text: digits.deviation
		},
		...compared,
		...components.map(({ name, method, value }) => ({
			name,
			method,
			value: inUnit(value),
			unit: ofPure,
			text: significant(inUnit(value), 5)
		})),
		{
			name: `Factor ${margin.symbol}`,
			method: margin.method,
			value: margin.factor,
			unit: '',
			text: digits.factor
		}
	];
}
