import type { DocumentSection } from './document';
import { isPrinted, type Place } from './place';
import { printNumber } from './printNumber';
import { symbolRuns } from './symbolRuns';

type HeadlineSection = Extract<DocumentSection, { kind: 'headline-figures' }>;
type Figure = HeadlineSection['figures'][number];

/** The few numbers a reader looks for first, from places that print them elsewhere as well. */
export function resolveHeadline(
	slots: readonly string[],
	places: readonly Place[]
): HeadlineSection {
	return {
		kind: 'headline-figures',
		figures: slots.flatMap((slot) => {
			const place = places.find((candidate) => isMeant(slot, candidate));
			return place === undefined ? [] : [figureOf(place)];
		})
	};
}

/** A slot's own key, or that of a table with one of its biases: `capacitance.25c.4`. */
function isMeant(slot: string, place: Place): boolean {
	return place.bias === null ? place.slot === slot : `${place.slot}.${place.bias}` === slot;
}

function figureOf(place: Place): Figure {
	const { figure, unit } = wordsOf(place);
	const label =
		place.kind === 'rating' && place.conditions === ''
			? `${place.label}, limiting value`
			: place.label;
	return { figure, unit, label: symbolRuns(label), basis: place.basis, slot: place.id };
}

function wordsOf(place: Place): Pick<Figure, 'figure' | 'unit'> {
	if (!isPrinted(place) || place.prints === null) return { figure: '–', unit: '' };
	const { minimum, typical, maximum, unit } = place.prints;
	const text = (of: string) => printNumber(of, 1).text;
	if (minimum !== null && maximum !== null)
		return { figure: `${text(minimum)} to ${text(maximum)}`, unit };
	if (maximum !== null) return { figure: text(maximum), unit: `${unit} max` };
	if (minimum !== null) return { figure: text(minimum), unit: `${unit} min` };
	return { figure: text(typical ?? '–'), unit: `${unit} typ` };
}
