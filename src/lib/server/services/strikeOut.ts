import { bindPlace } from '$lib/core/datasheet/bindPlace';
import type { StruckOut } from '$lib/core/datasheet/binding';
import { findAddress } from '$lib/core/datasheet/findAddress';
import { draftMessages } from '$lib/core/messages/datasheet';
import type { Stores } from '../work/stores';
import {
	editDraft,
	refused,
	storeBinding,
	type DraftEditor,
	type Edit,
	type Refused
} from './editDraft';

interface PlaceOf extends DraftEditor {
	/** Id of the place: the slot, or a row of a table. */
	readonly place: string;
}

/** Leaves a place out of this datasheet, with a reason that the reviewer reads. */
export async function strikeOut(
	{ db }: Pick<Stores, 'db'>,
	wanted: PlaceOf & { readonly reason: string }
): Promise<{ status: 'struck out' } | Refused> {
	const reason = wanted.reason.trim();
	if (reason === '') return refused(draftMessages.reasonNeeded());
	return editDraft(db, wanted, async (tx, { draft, name, at }) => {
		const address = findAddress(draft.template, wanted.place);
		if (address === undefined) return refused(draftMessages.slotUnknown(wanted.place));
		const struck: StruckOut = { kind: 'struck-out', reason, by: name, at };
		const next = bindPlace(draft.bindings.get(address.slot), address, struck);
		await storeBinding(tx, { draft: draft.id, slot: address.slot }, next);
		const edit: Edit<{ status: 'struck out' }> = {
			status: 'edited',
			action: 'draft.strike',
			what: `strike out ${wanted.place}`,
			details: { place: wanted.place, reason },
			result: { status: 'struck out' }
		};
		return edit;
	});
}

/** Empties a place: what was bound, typed or struck out there is gone from the draft. */
export async function clearSlot(
	{ db }: Pick<Stores, 'db'>,
	wanted: PlaceOf
): Promise<{ status: 'cleared' } | Refused> {
	return editDraft(db, wanted, async (tx, { draft }) => {
		const address = findAddress(draft.template, wanted.place);
		if (address === undefined) return refused(draftMessages.slotUnknown(wanted.place));
		const next = bindPlace(draft.bindings.get(address.slot), address, null);
		await storeBinding(tx, { draft: draft.id, slot: address.slot }, next);
		const edit: Edit<{ status: 'cleared' }> = {
			status: 'edited',
			action: 'draft.clear',
			what: `clear ${wanted.place}`,
			details: { place: wanted.place, before: draft.bindings.get(address.slot) ?? null },
			result: { status: 'cleared' }
		};
		return edit;
	});
}
