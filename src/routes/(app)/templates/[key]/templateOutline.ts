import { symbolText } from '$lib/core/characteristics/symbol';
import { conditionText } from '$lib/core/datasheet/conditionText';
import type { Template, TemplateSection } from '$lib/core/template/template';

/** A slot of a template as the page lists it. */
export interface OutlineSlot {
	readonly key: string;
	/** Symbols as plain text. */
	readonly what: string;
	readonly conditions: string;
	/** What has to be there: `min, max`, `max, typed`. */
	readonly wants: string;
	readonly unit: string;
	readonly isEssential: boolean;
}

export interface OutlineSection {
	readonly kind: TemplateSection['kind'];
	readonly title: string;
	readonly note: string;
	readonly slots: readonly OutlineSlot[];
}

const PARTS = { minimum: 'min', typical: 'typ', maximum: 'max' } as const;
const ENDS = { minimum: 'min', maximum: 'max', both: 'min, max' } as const;

/** A template as a list of sections with their slots. */
export function templateOutline({ sections }: Template): OutlineSection[] {
	return sections.map((section) => ({ kind: section.kind, ...outlineOf(section) }));
}

function outlineOf(section: TemplateSection): Omit<OutlineSection, 'kind'> {
	switch (section.kind) {
		case 'masthead':
			return { title: 'Masthead', note: 'Part number, class, description, status.', slots: [] };
		case 'prose':
			return { title: section.heading ?? 'Headline', note: section.hint, slots: [] };
		case 'headline-figures':
			return {
				title: 'Headline figures',
				note: `From ${section.slots.join(', ')}.`,
				slots: []
			};
		case 'ratings':
			return {
				title: section.heading,
				note: section.note ?? '',
				slots: section.slots.map((slot) => ({
					key: slot.slot,
					what: `${symbolText(slot.symbol)} ${slot.name}`,
					conditions: slot.conditions,
					wants: `${ENDS[slot.ends]}, typed${slot.step === undefined ? '' : `, in steps of ${slot.step}`}`,
					unit: slot.unit,
					isEssential: slot.essential
				}))
			};
		case 'thermal':
		case 'characteristics':
			return {
				title: section.heading,
				note: '',
				slots: section.slots.map((slot) => ({
					key: slot.slot,
					what: `${symbolText(slot.symbol)} ${slot.name}`,
					conditions: conditionText({ ...slot, others: slot.conditions }),
					wants: slot.required.map((part) => PARTS[part]).join(', '),
					unit: slot.unit,
					isEssential: slot.essential
				}))
			};
		case 'capacitance-table':
			return {
				title: section.heading,
				note: section.ratioTo === null ? '' : `With the ratio to ${section.ratioTo} V.`,
				slots: section.biases.map((bias) => ({
					key: `${section.slot}.${bias}`,
					what: 'C_tot total capacitance',
					conditions: conditionText({ ...section, reverseVoltage: bias }),
					wants: 'min, typ, max',
					unit: 'pF or nF',
					isEssential: section.essential
				}))
			};
		case 'capacitance-chart':
			return { title: section.heading, note: `Drawn from ${section.table}.`, slots: [] };
		case 'terminals':
			return {
				title: section.heading,
				note: section.terminals.map(({ number, name }) => `${number} ${name}`).join(', '),
				slots: []
			};
		case 'chart':
			return { title: section.heading, note: section.caption, slots: [] };
		case 'outline':
			return { title: section.heading, note: 'From the product’s package.', slots: [] };
		case 'test-circuit':
			return { title: section.heading, note: section.caption, slots: [] };
		case 'model':
			return { title: section.heading, note: `Fitted to ${section.table}.`, slots: [] };
		case 'ordering':
			return { title: section.heading, note: 'From the product’s ordering codes.', slots: [] };
		case 'revision-history':
			return { title: section.heading, note: 'Written when a revision is published.', slots: [] };
		case 'notice':
			return { title: section.heading, note: 'From the organization.', slots: [] };
		default:
			return section satisfies never;
	}
}
