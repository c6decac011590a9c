import { symbolText } from '../characteristics/symbol';
import type { LimitSlot, TemplateSection } from '../template/template';
import { conditionText } from './conditionText';
import { limitPlace } from './limitPlace';
import { placeLabel, type Place } from './place';
import { ratingPlace } from './ratingPlace';
import type { ResolveInput } from './resolveInput';

type Table = Extract<TemplateSection, { kind: 'capacitance-table' }>;

/** The total capacitance of a table: the one characteristic it prints. */
export const CAPACITANCE = {
	characteristic: 'C_tot',
	symbol: { quantity: 'C', subscript: 'tot' },
	name: 'total capacitance'
} as const;

/** Id of a row of a table: stable over revisions. */
export function tableRowId(slot: string, bias: number): string {
	return `${slot}.VR=${bias}`;
}

/** Every place of the template with what fills it, in the template's order. */
export function findPlaces(input: ResolveInput): Place[] {
	return input.template.sections.flatMap((section, index) => {
		switch (section.kind) {
			case 'ratings':
				return section.slots.map((slot) => ratingPlace(input, slot, index));
			case 'thermal':
			case 'characteristics':
				return section.slots.map((slot) => characteristicPlace(input, slot, index));
			case 'capacitance-table':
				return section.biases.map((bias) => tablePlace(input, section, bias, index));
			case 'masthead':
			case 'prose':
			case 'headline-figures':
			case 'terminals':
			case 'ordering':
			case 'capacitance-chart':
			case 'chart':
			case 'outline':
			case 'test-circuit':
			case 'model':
			case 'revision-history':
			case 'notice':
				return [];
			default:
				return section satisfies never;
		}
	});
}

function characteristicPlace(input: ResolveInput, slot: LimitSlot, section: number): Place {
	const held = input.bindings.get(slot.slot);
	const { temperatureCelsius, frequency, reverseVoltage } = slot;
	return limitPlace(input, {
		id: slot.slot,
		slot: slot.slot,
		bias: null,
		section,
		label: placeLabel(symbolText(slot.symbol), conditionText({ ...slot, others: slot.conditions })),
		essential: slot.essential,
		name: slot.characteristic,
		symbol: slot.symbol,
		title: slot.name,
		unit: slot.unit,
		conditions: conditionText({ ...slot, others: slot.conditions, temperatureCelsius: undefined }),
		temperatureCelsius,
		frequency: frequency ?? null,
		reverseVoltage: reverseVoltage ?? null,
		held: held?.kind === 'limit' || held?.kind === 'struck-out' ? held : null,
		row: input.limits.get(slot.slot)?.[0],
		required: slot.required
	});
}

function tablePlace(input: ResolveInput, table: Table, bias: number, section: number): Place {
	const held = input.bindings.get(table.slot);
	const { temperatureCelsius, frequency } = table;
	const bound = held?.kind === 'table' ? held.rows.find((row) => row.bias === bias) : undefined;
	return limitPlace(input, {
		id: tableRowId(table.slot, bias),
		slot: table.slot,
		bias,
		section,
		label: placeLabel(
			CAPACITANCE.characteristic,
			conditionText({ reverseVoltage: bias, temperatureCelsius })
		),
		essential: table.essential,
		name: CAPACITANCE.characteristic,
		symbol: CAPACITANCE.symbol,
		title: CAPACITANCE.name,
		unit: 'pF',
		conditions: conditionText({ reverseVoltage: bias, frequency }),
		temperatureCelsius,
		frequency,
		reverseVoltage: bias,
		held: held?.kind === 'struck-out' ? held : (bound?.binding ?? null),
		row: input.limits.get(table.slot)?.find(({ condition }) => condition.reverseVoltage === bias),
		required: ['minimum', 'typical', 'maximum']
	});
}
