import { numberText, type RatingBinding } from '$lib/core/datasheet/binding';
import { compareDecimals, roundRating } from '$lib/core/datasheet/decimalText';
import { findAddress } from '$lib/core/datasheet/findAddress';
import { draftMessages } from '$lib/core/messages/datasheet';
import type { RatingSlot } from '$lib/core/template/template';
import type { Stores } from '../work/stores';
import {
	editDraft,
	refused,
	storeBinding,
	type DraftEditor,
	type Edit,
	type Refused
} from './editDraft';

export interface TypedRating extends DraftEditor {
	readonly slot: string;
	/** As typed, in the unit of the slot; empty for an end the rating hasn't got. */
	readonly minimum: string;
	readonly maximum: string;
	readonly reason: string;
}

export type RatingOutcome =
	| {
			readonly status: 'set';
			readonly minimum: string | null;
			readonly maximum: string | null;
			/** Set when digits were rounded away, so that the rating claims less. */
			readonly remark: string | null;
	  }
	| Refused;

/** Types a limiting value: printed in the steps of its slot, rounded so that it claims less. */
export async function setRating(
	{ db }: Pick<Stores, 'db'>,
	wanted: TypedRating
): Promise<RatingOutcome> {
	const reason = wanted.reason.trim();
	if (reason === '') return refused(draftMessages.reasonNeeded());
	return editDraft(db, wanted, async (tx, { draft, name, at }) => {
		const address = findAddress(draft.template, wanted.slot);
		if (address === undefined) return refused(draftMessages.slotUnknown(wanted.slot));
		if (address.kind !== 'rating')
			return refused(draftMessages.slotOfOtherKind(wanted.slot, 'typed rating'));
		const ends = readEnds(wanted, address.rating);
		if ('message' in ends) return refused(ends.message);
		const { remark, ...texts } = ends;
		const binding: RatingBinding = { kind: 'rating', ...texts, reason, by: name, at };
		await storeBinding(tx, { draft: draft.id, slot: wanted.slot }, binding);
		const edit: Edit<RatingOutcome> = {
			status: 'edited',
			action: 'draft.rate',
			what: address.rating.name,
			details: { slot: wanted.slot, ...texts, reason },
			result: { status: 'set', ...texts, remark }
		};
		return edit;
	});
}

interface Ends {
	readonly minimum: string | null;
	readonly maximum: string | null;
	readonly remark: string | null;
}

function readEnds(
	typed: Pick<TypedRating, 'minimum' | 'maximum'>,
	{ ends, step }: RatingSlot
): Ends | { readonly message: string } {
	const wanted = ENDS[ends];
	const read = wanted.map((end) => ({ end, parsed: numberText.safeParse(typed[end]) }));
	const missing = read.flatMap(({ end, parsed }) => (parsed.success ? [] : [end]));
	if (missing.length > 0) return { message: draftMessages.ratingEnds(missing) };
	const texts = { minimum: null as string | null, maximum: null as string | null };
	const rounded: string[] = [];
	for (const { end, parsed } of read) {
		if (!parsed.success) continue;
		const printed = step === undefined ? parsed.data : roundRating(parsed.data, step);
		if (compareDecimals(printed, parsed.data) !== 0) rounded.push(printed);
		texts[end] = printed;
	}
	if (
		texts.minimum !== null &&
		texts.maximum !== null &&
		compareDecimals(texts.minimum, texts.maximum) >= 0
	)
		return { message: draftMessages.ratingEndsOrder() };
	const remark =
		rounded.length === 0 ? null : draftMessages.ratingStep(rounded.join(', '), step ?? 1);
	return { ...texts, remark };
}

const ENDS = {
	minimum: ['minimum'],
	maximum: ['maximum'],
	both: ['minimum', 'maximum']
} as const satisfies Record<RatingSlot['ends'], readonly ('minimum' | 'maximum')[]>;
