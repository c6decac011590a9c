import type { DatasheetDocument } from '$lib/core/datasheet/document';
import type { SlotView } from '$lib/core/datasheet/resolveInput';
import type { RatingSlot, TemplateSection } from '$lib/core/template/template';

/** A slot as the list shows it. */
export type SlotRow = Omit<SlotView, 'slot' | 'section'>;

type Figures = Extract<
	DatasheetDocument['sections'][number],
	{ kind: 'headline-figures' }
>['figures'];

/** A section of the template with what the draft has in it. */
export interface DraftSection {
	readonly index: number;
	readonly kind: TemplateSection['kind'];
	readonly title: string;
	readonly slots: readonly SlotRow[];
	/** Of ratings: what each slot asks to be typed. */
	readonly ratings: readonly Pick<RatingSlot, 'slot' | 'ends' | 'unit' | 'step'>[];
	readonly text: {
		readonly block: string;
		readonly hint: string;
		readonly text: string;
		readonly rowVersion: number;
	} | null;
	readonly figures: Figures;
}

export const isOpen = ({ state }: Pick<SlotRow, 'state'>): boolean =>
	state === 'unbound' || state === 'stale' || state === 'unsupported';

/** The states in the order the line of counts names them. */
export const COUNTED_STATES = [
	'bound',
	'stale',
	'unsupported',
	'overridden',
	'unbound',
	'struck out'
] as const;

/** How many slots are in each state that occurs. */
export function countStates(slots: readonly Pick<SlotRow, 'state'>[]) {
	return COUNTED_STATES.map((state) => ({
		state,
		count: slots.filter((slot) => slot.state === state).length
	})).filter(({ count }) => count > 0);
}

/** What a slot is filled by, in two words. */
export function boundTo({ kind, binding }: Pick<SlotRow, 'kind' | 'binding'>): string {
	if (binding === null) return kind === 'rating' ? 'rating' : 'limit';
	switch (binding.kind) {
		case 'limit':
			return binding.basis;
		case 'rating':
			return 'typed';
		case 'struck-out':
			return binding.reason;
		default:
			return binding satisfies never;
	}
}
