import type { SlotView } from '$lib/core/datasheet/resolveInput';
import type { Basis } from '$lib/core/limits/basis';
import type { Template } from '$lib/core/template/template';
import { CAPACITANCE } from './readBasis';

/** One number a place asks the measurements for. */
export interface LimitWanted {
	readonly slot: string;
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
	readonly bias: number;
	readonly policyVersion: number;
	readonly declaredBasis: Basis | undefined;
}

/** The number a place asks for, or `undefined` where no computation gives its characteristic. */
export function limitWantedAt(
	template: Template,
	place: Pick<SlotView, 'slot' | 'bias'>,
	by: { readonly policyVersion: number; readonly basis: Basis | undefined }
): LimitWanted | undefined {
	const terms = { policyVersion: by.policyVersion, declaredBasis: by.basis };
	for (const section of template.sections) {
		if (
			section.kind === 'capacitance-table' &&
			section.slot === place.slot &&
			place.bias !== null
		) {
			const { slot, temperatureCelsius, frequency } = section;
			return { slot, temperatureCelsius, frequency, bias: place.bias, ...terms };
		}
		if (section.kind !== 'characteristics') continue;
		const slot = section.slots.find((candidate) => candidate.slot === place.slot);
		if (slot?.characteristic !== CAPACITANCE.characteristic || slot.reverseVoltage === undefined)
			continue;
		const { temperatureCelsius, frequency, reverseVoltage } = slot;
		return {
			slot: slot.slot,
			temperatureCelsius,
			frequency,
			bias: reverseVoltage,
			...terms
		};
	}
	return undefined;
}
