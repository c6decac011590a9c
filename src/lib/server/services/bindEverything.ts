import { bindPlace } from '$lib/core/datasheet/bindPlace';
import type { Binding, LimitBinding } from '$lib/core/datasheet/binding';
import { resolve } from '$lib/core/datasheet/resolve';
import { draftMessages } from '$lib/core/messages/datasheet';
import type { Basis } from '$lib/core/limits/basis';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import type { Stores } from '../work/stores';
import { candidateFor } from './bindSlot';
import {
	editDraft,
	refused,
	storeBinding,
	type DraftEditor,
	type Edit,
	type Refused
} from './editDraft';
import { gatherDraft } from './gatherDraft';

export interface EverythingBound {
	readonly status: 'bound';
	/** Labels of the places that were bound. */
	readonly bound: readonly string[];
	/** What was left open, and why. */
	readonly left: readonly { readonly label: string; readonly why: string }[];
}

/**
 * Binds every open limit that the measurements carry, by the draft's policy. Stale and overridden
 * places are left: a person compares them. Ratings are left: somebody types them.
 */
export async function bindEverything(
	{ db }: Pick<Stores, 'db'>,
	wanted: DraftEditor & {
		readonly basis?: Basis | undefined;
		readonly basisReason?: string | undefined;
	}
): Promise<EverythingBound | Refused> {
	const product = await findProductByPartNumber(db, wanted.partNumber);
	if (product === undefined) return refused(draftMessages.productUnknown(wanted.partNumber));
	const gathered = await gatherDraft(db, product);
	if (gathered === undefined) return refused(draftMessages.noDraft(wanted.partNumber));

	const { open } = resolve(gathered.input);
	const matches: { place: (typeof open)[number]; terms: Terms }[] = [];
	const left: { label: string; why: string }[] = [];
	for (const place of open) {
		const why = reasonToLeave(place);
		if (why !== null) {
			left.push({ label: place.label, why });
			continue;
		}
		const candidate = await candidateFor(db, gathered, place, wanted);
		if (candidate.status === 'refused') left.push({ label: place.label, why: candidate.message });
		else matches.push({ place, terms: candidate.terms });
	}
	if (matches.length === 0) return { status: 'bound', bound: [], left };

	return editDraft(db, wanted, async (tx, { draft, at }): Promise<Edit<EverythingBound>> => {
		const bindings = new Map<string, Binding | null>(draft.bindings);
		for (const { place, terms } of matches) {
			const binding: LimitBinding = { kind: 'limit', ...terms, at };
			bindings.set(place.slot, bindPlace(bindings.get(place.slot) ?? undefined, place, binding));
		}
		for (const slot of new Set(matches.map(({ place }) => place.slot)))
			await storeBinding(tx, { draft: draft.id, slot }, bindings.get(slot) ?? null);
		return {
			status: 'edited',
			action: 'draft.bind',
			what: 'everything that matches',
			details: { places: matches.map(({ place }) => place.id) },
			result: { status: 'bound', bound: matches.map(({ place }) => place.label), left }
		};
	});
}

type Terms = Extract<Awaited<ReturnType<typeof candidateFor>>, { status: 'carried' }>['terms'];
type Place = ReturnType<typeof resolve>['open'][number];

function reasonToLeave({ kind, state, problem }: Place): string | null {
	if (kind === 'rating') return draftMessages.ratingIsTyped();
	return state === 'unbound' ? null : problem;
}
