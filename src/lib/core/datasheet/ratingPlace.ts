import { symbolText } from '../characteristics/symbol';
import { draftMessages } from '../messages/datasheet';
import type { RatingSlot } from '../template/template';
import type { RatingBinding } from './binding';
import { placeLabel, type Place } from './place';
import type { ResolveInput } from './resolveInput';
import { unitScaleOf } from './unitScale';

/** A limiting value's place, with what somebody typed there. */
export function ratingPlace({ bindings }: ResolveInput, slot: RatingSlot, section: number): Place {
	const held = bindings.get(slot.slot);
	const binding = held?.kind === 'rating' || held?.kind === 'struck-out' ? held : null;
	const state = binding === null ? 'unbound' : binding.kind === 'rating' ? 'bound' : 'struck out';
	return {
		id: slot.slot,
		slot: slot.slot,
		bias: null,
		section,
		kind: 'rating',
		label: placeLabel(symbolText(slot.symbol), slot.conditions),
		state,
		essential: slot.essential,
		required: [],
		prints: binding?.kind === 'rating' ? ratingTexts(binding, slot) : null,
		unit: slot.unit,
		unitScale: unitScaleOf(slot.unit),
		current: null,
		binding,
		problem: binding === null ? draftMessages.ratingUntyped() : null,
		warnings: [],
		name: symbolText(slot.symbol),
		symbol: slot.symbol,
		title: slot.name,
		conditions: slot.conditions,
		temperatureCelsius: null,
		frequency: null,
		reverseVoltage: null,
		basis: null,
		policy: null,
		trace: null,
		sampleSize: 0,
		independentLots: 0
	};
}

/** Only the ends the template asks for are printed. */
function ratingTexts({ minimum, maximum }: RatingBinding, { unit, ends }: RatingSlot) {
	return {
		unit,
		minimum: ends === 'maximum' ? null : minimum,
		typical: null,
		maximum: ends === 'minimum' ? null : maximum
	};
}
