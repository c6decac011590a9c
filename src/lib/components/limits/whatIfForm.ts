import { frequencyText, signedText } from './gridRow';
import type { Basis } from '$lib/core/limits/basis';
import type { Side } from '$lib/core/limits/allowance';
import type { LimitPolicy } from '$lib/core/limits/policy';
import { fixed, percent } from '$lib/core/limits/digits';
import type { TestYield } from '$lib/core/limits/limit';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import type { Comparison } from '$lib/core/limits/whatIf/compareLimits';
import type { WhatIfAnswer } from '$lib/core/limits/whatIf/whatIfAnswer';
import type { WhatIfField } from '$lib/core/limits/whatIf/readWhatIf';

/** What the fields of the trial hold: texts, as a form does. */
export type WhatIfFields = Readonly<
	Record<Exclude<WhatIfField, 'lot' | 'whatif'>, string> & { readonly lots: readonly string[] }
>;

/** A condition that a trial can look at. */
export interface WhatIfCondition {
	readonly key: string;
	readonly temperatureCelsius: number;
	/** Hz */
	readonly frequency: number | null;
	readonly bias: number;
}

/** The fields as the stored policy and the address have them. */
export function whatIfFields(
	search: URLSearchParams,
	stored: {
		readonly rules: LimitPolicy;
		readonly basis: Basis;
		readonly lots: readonly string[];
		readonly at: string;
	}
): WhatIfFields {
	const { rules } = stored;
	const isAsked = search.has('whatif');
	const text = (field: WhatIfField, otherwise: string) =>
		(isAsked ? search.get(field) : null) ?? otherwise;
	return {
		at: text('at', stored.at),
		content: text('content', String(rules.content)),
		confidence: text('confidence', String(rules.confidence)),
		method: text('method', rules.method),
		tails: text('tails', rules.tails),
		sides: text('sides', 'minimum-and-maximum'),
		behind: text('behind', stored.basis === 'typical' ? '' : stored.basis),
		drift: text('drift', typeof rules.drift === 'number' ? String(inPercent(rules.drift)) : ''),
		guard: text('guard', rules.guardBand === undefined ? '' : String(rules.guardBand)),
		lots: isAsked ? search.getAll('lot') : stored.lots
	};
}

const inPercent = (share: number) => Number((share * 100).toPrecision(6));

/** `25 °C, 1 MHz, V_R = 4 V`. */
export function conditionLabel({ temperatureCelsius, frequency, bias }: WhatIfCondition): string {
	return [
		`${signedText(temperatureCelsius)}\u00a0°C`,
		...(frequency === null ? [] : [frequencyText(frequency)]),
		`${signedText(bias)}\u00a0V`
	].join(', ');
}

/** What a trial makes of the table, in one sentence. */
export function whatIfSummary(answer: WhatIfAnswer): string {
	const [first] = answer.rows;
	const without =
		answer.lotsOut.length === 0 || first === undefined || first.sampleSize === 0
			? []
			: [limitsScreenMessages.withoutLots(answer.lotsOut, first.independentLots, first.sampleSize)];
	return [...without, limitsScreenMessages.differences(answer.counts)].join(' ');
}

/** `12.5 → 12.6 pF, tighter, raw limit +0.8 %`. */
export function comparisonText(
	side: Side,
	of: {
		readonly stored: string | null;
		readonly tried: string | null;
		readonly unit: string;
		readonly by: Comparison;
	}
): string {
	const { stored, tried, unit, by } = of;
	if (stored === null && tried === null) return `no ${side} in either`;
	const digits =
		stored === tried ? `${stored} ${unit}` : `${stored ?? 'none'} → ${tried ?? 'none'} ${unit}`;
	const words = {
		tighter: 'tighter',
		looser: 'looser',
		same: 'same digits',
		gained: 'new',
		lost: 'lost',
		none: ''
	}[by.difference];
	const moved =
		by.percent === null || Math.abs(by.percent) < 0.0005
			? []
			: [`${signed(by.percent)} before rounding`];
	return [digits, words, ...moved].join(', ');
}

function signed(value: number): string {
	const rounded = Number(value.toPrecision(2)) / 100;
	return `${value > 0 ? '+' : ''}${percent(rounded).replace('-', '\u2212')}`;
}

/** `74 of 75 stored devices, 98.2 % predicted`. */
export function yieldText({ predicted, passed, of }: TestYield): string {
	const share = `${fixed(predicted * 100, 1)}\u00a0% predicted`;
	return passed === null ? share : `${passed} of ${of} stored devices, ${share}`;
}

/** What stands in the fields of a form, as its address would say it. */
export function typedSearch(form: HTMLFormElement): URLSearchParams {
	const typed = new URLSearchParams();
	for (const [name, value] of new FormData(form)) {
		if (typeof value === 'string') typed.append(name, value);
	}
	return typed;
}
