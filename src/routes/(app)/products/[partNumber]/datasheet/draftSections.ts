import type { DraftSection, SlotRow } from '$lib/components/datasheet/draftSection';
import type { Resolved, SlotView } from '$lib/core/datasheet/resolveInput';
import type { TemplateSection } from '$lib/core/template/template';
import type { FoundDraft } from '$lib/server/db/findDraft';

/** The template's sections with what the draft has in them, in order. */
export function draftSections(
	{ template, texts }: FoundDraft,
	{ slots, proof }: Resolved
): DraftSection[] {
	return template.sections.map((section, index) => ({
		index,
		kind: section.kind,
		title: titleOf(section),
		slots: slots.filter((slot) => slot.section === index).map(slotRow),
		ratings: section.kind === 'ratings' ? section.slots : [],
		text:
			section.kind === 'prose'
				? {
						block: section.block,
						hint: section.hint,
						text: texts.get(section.block)?.text ?? '',
						rowVersion: texts.get(section.block)?.rowVersion ?? 0
					}
				: null,
		figures: section.kind === 'headline-figures' ? figuresOf(proof) : []
	}));
}

/** Only what the page needs of a slot goes to the browser. */
function slotRow(slot: SlotView): SlotRow {
	const { id, bias, kind, label, state, essential, required, prints, current } = slot;
	const { binding, problem, warnings } = slot;
	return {
		id,
		bias,
		kind,
		label,
		state,
		essential,
		required,
		prints,
		current,
		binding,
		problem,
		warnings
	};
}

function figuresOf({ sections }: Resolved['proof']): DraftSection['figures'] {
	return sections.flatMap((section) =>
		section.kind === 'headline-figures' ? section.figures : []
	);
}

function titleOf(section: TemplateSection): string {
	switch (section.kind) {
		case 'masthead':
			return 'Masthead';
		case 'headline-figures':
			return 'Headline figures';
		case 'prose':
			return section.heading ?? 'Headline';
		case 'terminals':
		case 'ordering':
		case 'ratings':
		case 'thermal':
		case 'characteristics':
		case 'capacitance-table':
		case 'capacitance-chart':
		case 'chart':
		case 'outline':
		case 'test-circuit':
		case 'model':
		case 'revision-history':
		case 'notice':
			return section.heading;
		default:
			return section satisfies never;
	}
}
