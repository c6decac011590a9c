import { readNumber } from '../../units/readNumber';
import { limitsScreenMessages } from '../../messages/limitsScreen';
import { whatIfChange, type WhatIfChange } from './whatIfRequest';

/** The fields of the what-if form, as its address names them. */
export const WHAT_IF_FIELDS = [
	'whatif',
	'at',
	'content',
	'confidence',
	'method',
	'tails',
	'sides',
	'behind',
	'drift',
	'guard',
	'lot'
] as const;
export type WhatIfField = (typeof WHAT_IF_FIELDS)[number];

export type WhatIfQuery =
	| { readonly status: 'read'; readonly change: WhatIfChange }
	| { readonly status: 'refused'; readonly field: WhatIfField; readonly message: string };

/** Shares, percentages and factors as people type them, each with what is asked of it. */
const NUMBERS = {
	content: { key: 'content', scale: 1, expects: limitsScreenMessages.expectsShare },
	confidence: { key: 'confidence', scale: 1, expects: limitsScreenMessages.expectsShare },
	drift: { key: 'drift', scale: 100, expects: limitsScreenMessages.expectsDrift },
	guard: { key: 'guardBand', scale: 1, expects: limitsScreenMessages.expectsGuardBand }
} as const;

const CHOICES = { method: 'method', tails: 'tails', sides: 'sides', behind: 'basis' } as const;

/**
 * What the form of the limits page asks, from the address or the fields themselves. An empty field
 * leaves the policy as it is. Boxes that are not ticked are not sent, so that the lots that are sent
 * stay in; a form without lots says so by `whatif=all-lots`.
 */
export function readWhatIf(search: URLSearchParams): WhatIfQuery {
	const change: Record<string, unknown> = {};
	for (const field of ['content', 'confidence', 'drift', 'guard'] as const) {
		const text = search.get(field)?.trim() ?? '';
		if (text === '') continue;
		const { key, scale, expects } = NUMBERS[field];
		const value = readNumber(text);
		const scaled = value === undefined ? undefined : Number((value / scale).toPrecision(12));
		if (!whatIfChange.shape[key].safeParse(scaled).success || scaled === undefined) {
			return { status: 'refused', field, message: expects(text) };
		}
		change[key] = scaled;
	}
	for (const field of ['method', 'tails', 'sides', 'behind'] as const) {
		const text = search.get(field) ?? '';
		if (text === '') continue;
		const key = CHOICES[field];
		if (!whatIfChange.shape[key].safeParse(text).success) {
			return { status: 'refused', field, message: limitsScreenMessages.expectsChoice(field, text) };
		}
		change[key] = text;
	}
	if (search.get('whatif') !== 'all-lots') change['lots'] = search.getAll('lot');
	return { status: 'read', change: whatIfChange.parse(change) };
}
