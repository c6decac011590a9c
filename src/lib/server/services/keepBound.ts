import { bindPlace } from '$lib/core/datasheet/bindPlace';
import type { LimitBinding } from '$lib/core/datasheet/binding';
import { resolve } from '$lib/core/datasheet/resolve';
import { draftMessages } from '$lib/core/messages/datasheet';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import type { Stores } from '../work/stores';
import {
	editDraft,
	refused,
	storeBinding,
	type DraftEditor,
	type Edit,
	type Refused
} from './editDraft';
import { gatherDraft } from './gatherDraft';

/**
 * Keeps what a place printed although newer data moved it or carry it no longer: an override, with
 * its reason. When the data move again the question is asked again.
 */
export async function keepBound(
	{ db }: Pick<Stores, 'db'>,
	wanted: DraftEditor & {
		readonly place: string;
		readonly reason: string;
		/** `inputHash` of what the person compared with; refused when it moved since. */
		readonly expected?: string | undefined;
	}
): Promise<{ status: 'kept' } | Refused> {
	const reason = wanted.reason.trim();
	if (reason === '') return refused(draftMessages.reasonNeeded());
	const product = await findProductByPartNumber(db, wanted.partNumber);
	if (product === undefined) return refused(draftMessages.productUnknown(wanted.partNumber));
	const gathered = await gatherDraft(db, product);
	if (gathered === undefined) return refused(draftMessages.noDraft(wanted.partNumber));
	const place = resolve(gathered.input).slots.find(({ id }) => id === wanted.place);
	if (place === undefined) return refused(draftMessages.slotUnknown(wanted.place));
	const { binding, current, state } = place;
	if (binding?.kind !== 'limit' || (state !== 'stale' && state !== 'unsupported'))
		return refused(draftMessages.nothingToKeep(place.label));
	if (wanted.expected !== undefined && wanted.expected !== (current?.inputHash ?? ''))
		return refused(draftMessages.movedMeanwhile());

	return editDraft(
		db,
		wanted,
		async (tx, { draft, name, at }): Promise<Edit<{ status: 'kept' }>> => {
			const kept: LimitBinding = { ...binding, kept: { reason, by: name, at, against: current } };
			const next = bindPlace(draft.bindings.get(place.slot), place, kept);
			await storeBinding(tx, { draft: draft.id, slot: place.slot }, next);
			return {
				status: 'edited',
				action: 'draft.keep',
				what: place.label,
				details: { place: place.id, reason, printed: binding.printed, against: current },
				result: { status: 'kept' }
			};
		}
	);
}
