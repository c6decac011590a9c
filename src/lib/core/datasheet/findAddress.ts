import type { RatingSlot, Template, TemplateSection } from '../template/template';
import type { LimitAddress } from './bindPlace';
import { tableRowId } from './findPlaces';

/** A place of a template by its id. */
export type PlaceAddress =
	| ({ readonly kind: 'limit' } & LimitAddress)
	| {
			readonly kind: 'rating';
			readonly slot: string;
			readonly bias: null;
			readonly rating: RatingSlot;
	  };

/** Sections whose slots are characteristics at one condition each. */
const hasLimitSlots = (
	section: TemplateSection
): section is Extract<TemplateSection, { kind: 'characteristics' | 'thermal' }> =>
	section.kind === 'characteristics' || section.kind === 'thermal';

/** Where the place with this id is, or `undefined`. */
export function findAddress({ sections }: Template, id: string): PlaceAddress | undefined {
	for (const section of sections) {
		if (section.kind === 'ratings') {
			const rating = section.slots.find(({ slot }) => slot === id);
			if (rating !== undefined) return { kind: 'rating', slot: id, bias: null, rating };
		}
		if (hasLimitSlots(section) && section.slots.some(({ slot }) => slot === id))
			return { kind: 'limit', slot: id, bias: null };
		if (section.kind === 'capacitance-table') {
			const bias = section.biases.find((at) => tableRowId(section.slot, at) === id);
			if (bias !== undefined) return { kind: 'limit', slot: section.slot, bias };
		}
	}
	return undefined;
}
