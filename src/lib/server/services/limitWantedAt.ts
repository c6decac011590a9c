import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import { condition as conditionSchema, type Condition } from '$lib/core/characteristics/condition';
import { unitScaleOf } from '$lib/core/datasheet/unitScale';
import type { SlotView } from '$lib/core/datasheet/resolveInput';
import type { Side } from '$lib/core/limits/allowance';
import type { Basis } from '$lib/core/limits/basis';
import type { TableUnit } from '$lib/core/limits/tableUnit';
import type { LimitSlot, Template } from '$lib/core/template/template';
import { CAPACITANCE } from './readBasis';

interface WantedTerms {
	readonly slot: string;
	readonly policyVersion: number;
	readonly declaredBasis: Basis | undefined;
}

/** A capacitance that a place asks for, which comes from the table of its temperature and frequency. */
export interface CapacitanceWanted extends WantedTerms {
	readonly kind: 'capacitance';
	readonly temperatureCelsius: number;
	readonly frequency: number | undefined;
	readonly bias: number;
}

/** A reading or something derived that a place asks for, in the unit it prints. */
export interface CharacteristicWanted extends WantedTerms {
	readonly kind: 'characteristic';
	readonly characteristic: string;
	readonly condition: Condition;
	readonly sides: readonly Side[];
	readonly unit: TableUnit;
}

/** One number a place asks the measurements for. */
export type LimitWanted = CapacitanceWanted | CharacteristicWanted;

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
			return {
				kind: 'capacitance',
				slot,
				temperatureCelsius,
				frequency,
				bias: place.bias,
				...terms
			};
		}
		if (section.kind !== 'characteristics' && section.kind !== 'thermal') continue;
		const slot = section.slots.find((candidate) => candidate.slot === place.slot);
		if (slot !== undefined) return wantedBySlot(slot, terms);
	}
	return undefined;
}

function wantedBySlot(slot: LimitSlot, terms: Omit<WantedTerms, 'slot'>): LimitWanted | undefined {
	const { temperatureCelsius, frequency, reverseVoltage } = slot;
	if (slot.characteristic === CAPACITANCE.characteristic) {
		return reverseVoltage === undefined
			? undefined
			: {
					kind: 'capacitance',
					slot: slot.slot,
					temperatureCelsius,
					frequency,
					bias: reverseVoltage,
					...terms
				};
	}
	const known = findCharacteristic(slot.characteristic);
	if (known === undefined || known.measuredAs === 'sweep') return undefined;
	return {
		kind: 'characteristic',
		slot: slot.slot,
		characteristic: known.key,
		condition: conditionSchema.parse(slot),
		sides: (['minimum', 'maximum'] as const).filter(
			(side) => known.promised.includes(side) || slot.required.includes(side)
		),
		unit: { unit: slot.unit, unitScale: unitScaleOf(slot.unit) },
		...terms
	};
}
