import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { fixed, percent, pValue, readDigits, significant } from './digits';
import { inTableUnit } from './inTableUnit';
import type { DerivationStep } from './limit';
import { outwards, type LimitChain } from './limitChain';
import { LOTS_DIFFER_BELOW, type LotTest } from './lotTest';
import type { Margin, Side } from './methods/method';
import type { LimitPolicy } from './policy';
import { resolutionText } from './resolutionText';

export interface LimitStepsInput {
	readonly distribution: Distribution;
	/** How the values are called: `C`. */
	readonly symbol: string;
	readonly unit: string;
	readonly unitScale: number;
	readonly side: Side;
	readonly margin: Margin;
	readonly rules: LimitPolicy;
	readonly lots: LotTest | undefined;
	readonly chain: LimitChain;
}

const FEWEST_FIGURES = 5;
const MOST_FIGURES = 12;

/**
 * The lines of a minimum or maximum after the sample: mean, spread, factor, raw limit, allowances,
 * rounding. The digits are as few as let a reader redo the sum from what is printed and arrive at
 * the same limit; where five figures round to another step, more are shown.
 */
export function limitSteps(input: LimitStepsInput): DerivationStep[] {
	for (let figures = FEWEST_FIGURES; figures < MOST_FIGURES; figures++) {
		const digits = digitsOf(input, figures);
		if (canBeRedone(input, digits)) return steps(input, digits);
	}
	return steps(input, digitsOf(input, MOST_FIGURES));
}

interface ChainDigits {
	readonly mean: string;
	readonly deviation: string;
	readonly factor: string;
	readonly raw: string;
	readonly afterDrift: string;
	readonly afterUncertainty: string;
}

function digitsOf(input: LimitStepsInput, figures: number): ChainDigits {
	const moments = inTableUnit(input.distribution, input.unitScale);
	const isLogarithm = input.distribution.transform !== 'identity';
	return {
		mean: isLogarithm ? fixed(moments.mean, figures) : significant(moments.mean, figures),
		deviation: isLogarithm
			? fixed(moments.standardDeviation, figures + 1)
			: significant(moments.standardDeviation, figures),
		factor: fixed(input.margin.factor, figures - 1),
		raw: significant(input.chain.raw, figures),
		afterDrift: significant(input.chain.afterDrift, figures),
		afterUncertainty: significant(input.chain.afterUncertainty, figures)
	};
}

/** Redoes the sum from the printed digits alone. */
function canBeRedone(input: LimitStepsInput, digits: ChainDigits): boolean {
	const { rules, side, distribution, chain } = input;
	const uncertainty = distribution.uncertainty ?? 0;
	const sign = side === 'minimum' ? -1 : 1;
	const raw = TRANSFORMS[distribution.transform].invert(
		readDigits(digits.mean) + sign * readDigits(digits.factor) * readDigits(digits.deviation)
	);
	const isPrinted = (value: number) =>
		outwards(value, { side, rules, uncertainty }).printed.text === chain.printed.text;
	const isRounded = (value: number) =>
		outwards(value, { side, rules: { ...rules, drift: 0 }, uncertainty: 0 }).printed.text ===
		chain.printed.text;
	return (
		isPrinted(raw) &&
		isPrinted(readDigits(digits.raw)) &&
		isRounded(readDigits(digits.afterUncertainty))
	);
}

function steps(input: LimitStepsInput, digits: ChainDigits): DerivationStep[] {
	const { distribution, symbol, unit, side, margin, rules, lots, chain } = input;
	const { transform, sampleSize } = distribution;
	const moments = inTableUnit(distribution, input.unitScale);
	const of = `${TRANSFORMS[transform].prefix}${symbol}`;
	const word = side === 'minimum' ? 'down' : 'up';
	const sum = `${digits.mean} ${side === 'minimum' ? '\u2212' : '+'} ${digits.factor} × ${digits.deviation}`;
	const ofPure = transform === 'identity' ? unit : '';
	return [
		{
			name: `Mean of ${of}`,
			method: `All ${sampleSize} devices together, not interpolated. ${symbol} in ${unit}.`,
			value: moments.mean,
			unit: ofPure,
			text: digits.mean
		},
		{
			name: `Spread of ${of}`,
			method: 'Standard deviation of all devices about their own mean, divided by n − 1.',
			value: moments.standardDeviation,
			unit: ofPure,
			text: digits.deviation
		},
		...(lots === undefined ? [] : [lotStep(lots)]),
		{
			name: `Factor ${margin.symbol}`,
			method: margin.method,
			value: margin.factor,
			unit: '',
			text: digits.factor
		},
		{
			name: `Raw ${side}`,
			method: rawText(transform, sum),
			value: chain.raw,
			unit,
			text: digits.raw
		},
		{
			name: 'Drift over life',
			method:
				rules.drift === 0 ? 'The policy allows for none.' : `${percent(rules.drift)} outwards.`,
			value: chain.afterDrift,
			unit,
			text: digits.afterDrift
		},
		{
			name: 'Systematic uncertainty',
			method:
				distribution.uncertainty === null
					? 'None stated, none added.'
					: `${percent(distribution.uncertainty)} outwards, the largest that the sets state.`,
			value: chain.afterUncertainty,
			unit,
			text: digits.afterUncertainty
		},
		{
			name: `Round ${word}`,
			method: `${resolutionText(rules.resolution, unit)}, outwards, in decimal arithmetic.`,
			value: chain.printed.value,
			unit,
			text: chain.printed.text
		}
	];
}

function rawText(transform: Distribution['transform'], sum: string): string {
	switch (transform) {
		case 'identity':
			return sum;
		case 'ln':
			return `exp(${sum})`;
		case 'log10':
			return `10 to the power (${sum})`;
		default:
			return transform satisfies never;
	}
}

function lotStep(lots: LotTest): DerivationStep {
	const verdict =
		lots.p < LOTS_DIFFER_BELOW
			? 'The lots differ and are pooled all the same: the limit speaks of these lots.'
			: `No difference is seen; that ${lots.lots} lots are alike is not shown by it. They are pooled.`;
	return {
		name: 'Lots compared, F',
		method: `One-way analysis of variance between ${lots.lots} wafer lots, F(${lots.betweenDegrees}, ${lots.withinDegrees}), ${pValue(lots.p)}. ${verdict}`,
		value: Number.isFinite(lots.F) ? lots.F : null,
		unit: '',
		text: Number.isFinite(lots.F) ? fixed(lots.F, 2) : '∞'
	};
}
