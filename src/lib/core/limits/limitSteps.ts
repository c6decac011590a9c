import type { Distribution } from '../distributions/summary';
import { TRANSFORMS } from '../distributions/transforms';
import { NO_ALLOWANCE, isNothing, type Allowance, type Side } from './allowance';
import { allowanceText } from './allowanceText';
import { readDigits, significant } from './digits';
import { driftOn } from './drift';
import type { DerivationStep } from './limit';
import { limitChain, type LimitChain } from './limitChain';
import { lotStep } from './lotStep';
import type { LotTest } from './lotTest';
import { marginDigits, marginSteps, sumOf, type MarginDigits } from './marginSteps';
import type { SideLimit } from './methods/method';
import type { LimitPolicy } from './policy';
import { resolutionText } from './resolutionText';

export interface LimitStepsInput {
	readonly distribution: Distribution;
	/** How the values are called: `C`. */
	readonly symbol: string;
	readonly unit: string;
	readonly unitScale: number;
	readonly side: Side;
	readonly limit: SideLimit;
	readonly isPooled: boolean;
	readonly rules: LimitPolicy;
	readonly lots: LotTest | undefined;
	/** Systematic uncertainty that the sets state. */
	readonly stated: Allowance | null;
	/** What of it the policy adds. */
	readonly uncertainty: Allowance;
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
	readonly margin: MarginDigits | undefined;
	readonly raw: string;
	readonly afterDrift: string;
	readonly afterUncertainty: string;
}

function digitsOf({ limit, chain, ...input }: LimitStepsInput, figures: number): ChainDigits {
	const { transform } = input.distribution;
	return {
		margin:
			limit.kind === 'margin'
				? marginDigits(limit, { transform, unitScale: input.unitScale, figures })
				: undefined,
		raw: significant(chain.raw, figures),
		afterDrift: significant(chain.afterDrift, figures),
		afterUncertainty: significant(chain.afterUncertainty, figures)
	};
}

/** Redoes the sum from the printed digits alone. */
function canBeRedone(input: LimitStepsInput, digits: ChainDigits): boolean {
	const { rules, side, uncertainty, unitScale, distribution, chain } = input;
	const arrives = (raw: number) =>
		limitChain(raw, { side, rules, uncertainty, unitScale }).printed.text === chain.printed.text;
	const isRounded = (value: number) =>
		limitChain(value, {
			side,
			rules: { ...rules, drift: 0 },
			uncertainty: NO_ALLOWANCE,
			unitScale
		}).printed.text === chain.printed.text;
	const { invert } = TRANSFORMS[distribution.transform];
	return (
		(digits.margin === undefined || arrives(invert(sumOf(digits.margin, side)))) &&
		arrives(readDigits(digits.raw)) &&
		isRounded(readDigits(digits.afterUncertainty))
	);
}

function steps(input: LimitStepsInput, digits: ChainDigits): DerivationStep[] {
	const { unit, side, lots, chain, limit } = input;
	const compared = lots === undefined ? [] : [lotStep(lots, input.isPooled)];
	return [
		...(limit.kind === 'margin' && digits.margin !== undefined
			? marginSteps(limit, { ...input, digits: digits.margin, compared })
			: compared),
		...(limit.kind === 'ranked' ? [rankStep(limit.rank, limit.method, side)] : []),
		{
			name: `Raw ${side}`,
			method: rawText(input, digits.margin),
			value: chain.raw,
			unit,
			text: digits.raw
		},
		...allowanceSteps(input, digits),
		{
			name: `Round ${side === 'minimum' ? 'down' : 'up'}`,
			method: `${resolutionText(input.rules.resolution, unit)}, outwards, in decimal arithmetic.`,
			value: chain.printed.value,
			unit,
			text: chain.printed.text
		}
	];
}

function rankStep(rank: number, method: string, side: Side): DerivationStep {
	const from = side === 'minimum' ? 'below' : 'above';
	return { name: `Rank from ${from}`, method, value: rank, unit: '', text: String(rank) };
}

function rawText({ side, distribution }: LimitStepsInput, digits?: MarginDigits): string {
	if (digits === undefined) return 'The value of that device.';
	const sum = `${digits.mean} ${side === 'minimum' ? '\u2212' : '+'} ${digits.factor} × ${digits.deviation}`;
	switch (distribution.transform) {
		case 'identity':
			return sum;
		case 'ln':
			return `exp(${sum})`;
		case 'log10':
			return `10 to the power (${sum})`;
		default:
			return distribution.transform satisfies never;
	}
}

function allowanceSteps(input: LimitStepsInput, digits: ChainDigits): DerivationStep[] {
	const { unit, side, chain, rules, stated, uncertainty } = input;
	const drift = driftOn(rules, side);
	return [
		{
			name: 'Drift over life',
			method: isNothing(drift)
				? 'The policy allows for none.'
				: `${allowanceText(drift, input)} outwards.`,
			value: chain.afterDrift,
			unit,
			text: digits.afterDrift
		},
		{
			name: 'Systematic uncertainty',
			method: uncertaintyText(stated, uncertainty, input),
			value: chain.afterUncertainty,
			unit,
			text: digits.afterUncertainty
		}
	];
}

function uncertaintyText(
	stated: Allowance | null,
	added: Allowance,
	input: LimitStepsInput
): string {
	if (stated === null) return 'None stated, none added.';
	if (isNothing(added) && !isNothing(stated)) {
		return `${allowanceText(stated, input)} stated; by the policy not added.`;
	}
	return `${allowanceText(stated, input)} outwards, the largest that the sets state.`;
}
