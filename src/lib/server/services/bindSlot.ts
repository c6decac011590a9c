import type { BoundTexts, LimitBinding } from '$lib/core/datasheet/binding';
import { bindPlace } from '$lib/core/datasheet/bindPlace';
import { boundTextsOf, computedBasis } from '$lib/core/datasheet/boundTexts';
import { neededParts } from '$lib/core/datasheet/limitPlace';
import { resolve } from '$lib/core/datasheet/resolve';
import type { SlotView } from '$lib/core/datasheet/resolveInput';
import { BASIS_WORDS, type Basis } from '$lib/core/limits/basis';
import { draftMessages } from '$lib/core/messages/datasheet';
import type { Connection } from '../db/database';
import { findPolicyVersion } from '../db/findPolicies';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import type { Stores } from '../work/stores';
import { decidedTexts } from './decidedTexts';
import { computeLimits } from './draftLimits';
import {
	editDraft,
	refused,
	storeBinding,
	type Edit,
	type DraftEditor,
	type Refused
} from './editDraft';
import { gatherDraft, type GatheredDraft } from './gatherDraft';
import { limitWantedAt } from './limitWantedAt';

export interface SlotToBind extends DraftEditor {
	/** Id of the place: the slot, or a row of a table, `capacitance.25c.VR=4`. */
	readonly place: string;
	/** The policy of the draft, unless said otherwise. */
	readonly policyVersion?: number | undefined;
	/** What stands behind the limits; what the computation gives by itself, unless said otherwise. */
	readonly basis?: Basis | undefined;
	/** Which test or study makes it so, where the computation alone doesn't. */
	readonly basisReason?: string | undefined;
	/** `inputHash` of what the person was shown; refused when the measurements moved it since. */
	readonly expected?: string | undefined;
}

export type BindOutcome = { readonly status: 'bound'; readonly prints: BoundTexts } | Refused;

/** Binds one place to what the measurements say now, by a policy and on a basis. */
export async function bindSlot(
	{ db }: Pick<Stores, 'db'>,
	wanted: SlotToBind
): Promise<BindOutcome> {
	const product = await findProductByPartNumber(db, wanted.partNumber);
	if (product === undefined) return refused(draftMessages.productUnknown(wanted.partNumber));
	const gathered = await gatherDraft(db, product);
	if (gathered === undefined) return refused(draftMessages.noDraft(wanted.partNumber));
	const place = resolve(gathered.input).slots.find(({ id }) => id === wanted.place);
	if (place === undefined) return refused(draftMessages.slotUnknown(wanted.place));
	const candidate = await candidateFor(db, gathered, place, wanted);
	if (candidate.status === 'refused') return candidate;

	return editDraft(db, wanted, async (tx, { draft, at }): Promise<Edit<BindOutcome>> => {
		const binding: LimitBinding = { kind: 'limit', ...candidate.terms, at };
		const next = bindPlace(draft.bindings.get(place.slot), place, binding);
		await storeBinding(tx, { draft: draft.id, slot: place.slot }, next);
		return {
			status: 'edited',
			action: 'draft.bind',
			what: place.label,
			details: { place: place.id, ...candidate.terms },
			result: { status: 'bound', prints: candidate.terms.printed }
		};
	});
}

type Terms = Omit<LimitBinding, 'kind' | 'at'>;
type Candidate = { readonly status: 'carried'; readonly terms: Terms } | Refused;

/** What would be bound here, or why nothing can be. */
export async function candidateFor(
	db: Connection,
	{ draft, product, input }: GatheredDraft,
	place: SlotView,
	wanted: Omit<SlotToBind, 'partNumber' | 'by' | 'place'>
): Promise<Candidate> {
	const refuse = (why: string) => refused(draftMessages.nothingToBind(place.label, why));
	if (place.kind === 'rating') return refused(draftMessages.slotOfOtherKind(place.label, 'limit'));
	const held = place.binding?.kind === 'limit' ? place.binding : undefined;
	const policyId = wanted.policyVersion ?? held?.policyVersion ?? draft.policyVersion;
	const policy = await findPolicyVersion(db, policyId);
	if (policy === undefined) return refused(draftMessages.policyVersionUnknown());

	const basis = wanted.basis ?? held?.basis ?? computedBasis(policy.rules);
	const basisReason = wanted.basisReason?.trim() || held?.basisReason || null;
	if (!COMPUTED.has(basis) && basisReason === null)
		return refused(draftMessages.basisNeedsReason(BASIS_WORDS[basis]));

	const asked = limitWantedAt(draft.template, place, { policyVersion: policyId, basis });
	if (asked === undefined) return refuse(draftMessages.nothingComputed(place.label));
	const isGathered = place.binding === null && policyId === draft.policyVersion;
	const row =
		isGathered && basis === 'characterized'
			? input.limits
					.get(asked.slot)
					?.find(
						({ condition }) =>
							asked.kind === 'characteristic' || condition.reverseVoltage === asked.bias
					)
			: (await computeLimits(db, product.id, [asked])).limits.get(asked.slot)?.[0];
	if (row === undefined) return refuse(draftMessages.nothingComputed(place.label));
	const decided = await decidedTexts(db, product.id, {
		row,
		policyVersion: policyId,
		basis,
		machine: boundTextsOf(row, { basis, rules: policy.rules })
	});
	const { printed } = decided;
	const needed = neededParts(place.required, {
		bias: place.bias,
		declaredBasis: wanted.basis ?? held?.basis
	});
	const missing = needed.filter((part) => printed[part] === null);
	if (missing.length > 0)
		return refuse(
			basis === 'typical' && row.refusals.length === 0
				? draftMessages.basisTypicalRequired(missing)
				: draftMessages.missingParts(missing, row.refusals)
		);
	if (wanted.expected !== undefined && wanted.expected !== printed.inputHash)
		return refused(draftMessages.movedMeanwhile());
	return { status: 'carried', terms: { policyVersion: policyId, basis, basisReason, ...decided } };
}

/** What a computation gives by itself; the other bases are declared, with a reason. */
const COMPUTED = new Set<Basis>(['characterized', 'typical']);
