import type { CharacteristicRow, RatingRow } from './document';
import type { Place } from './place';
import { printOptional } from './printNumber';
import { symbolRuns } from './symbolRuns';

/** A limiting value, with the person and the reason it rests on. */
export function ratingRowOf(place: Place): RatingRow {
	const typed = place.binding?.kind === 'rating' ? place.binding : null;
	return {
		...common(place),
		minimum: printOptional(place.prints?.minimum ?? null, place.unitScale),
		maximum: printOptional(place.prints?.maximum ?? null, place.unitScale),
		unit: place.unit,
		by: typed?.by ?? null,
		reason: typed?.reason ?? null
	};
}

export function characteristicRowOf(place: Place): CharacteristicRow {
	return {
		...common(place),
		temperatureCelsius: place.temperatureCelsius ?? 25,
		minimum: printOptional(place.prints?.minimum ?? null, place.unitScale),
		typical: printOptional(place.prints?.typical ?? null, place.unitScale),
		maximum: printOptional(place.prints?.maximum ?? null, place.unitScale),
		unit: place.prints?.unit ?? place.unit,
		basis: place.prints === null ? null : place.basis
	};
}

function common({ id, slot, state, trace, symbol, title, conditions }: Place) {
	return { id, slot, state, trace, symbol, name: title, conditions: symbolRuns(conditions) };
}
