import type { DocumentSection } from '../../../core/datasheet/document';
import type { Block, Section } from './flow';
import { capacitanceChartSection } from './sections/capacitanceChart';
import { capacitanceRowIds } from './sections/capacitanceRows';
import { capacitanceTable } from './sections/capacitanceTable';
import { characteristics } from './sections/characteristics';
import { headlineFigures } from './sections/headlineFigures';
import { masthead } from './sections/masthead';
import { notice } from './sections/notice';
import { ordering } from './sections/ordering';
import { listColumns, proseParagraphs, type AttachedFile } from './sections/prose';
import { ratings } from './sections/ratings';
import { revisionHistory } from './sections/revisionHistory';
import { statusBox } from './sections/statusBox';
import type { SectionOf, Sheet } from './sheet';

/** Spaces on the first page, in pt, as the specimen sets them. */
const GAPS = { statusBox: 10, paragraph: 17, figures: 16.4 };

/** Lists that stand side by side. */
const LISTS_IN_A_ROW = 3;

const plain = (block: Block, title: string | null, gapBefore: Section['gapBefore']): Section => ({
	title,
	gapBefore,
	head: null,
	continued: null,
	parts: [{ kind: 'block', block }]
});

/**
 * The sections of a sheet in print order. Lists that follow each other stand side by side, the
 * masthead is first wherever the template has it, and what is empty is left out.
 */
export function arrange(sheet: Sheet, attached: readonly AttachedFile[]): Section[] {
	const sections: Section[] = [plain(masthead(sheet), null, 0)];
	const box = statusBox(sheet);
	if (box) sections.push(plain(box, null, GAPS.statusBox));

	let figures = 0;
	let isAttachmentNamed = false;
	const isCapacitanceChanged = capacitanceRowIds(sheet.document).some((row) =>
		sheet.changed.has(row)
	);
	for (const group of grouped(sheet.document.sections)) {
		const [section] = group;
		if (!section) continue;
		switch (section.kind) {
			case 'masthead':
				break;
			case 'prose':
				if (section.style === 'list')
					sections.push(
						plain(listColumns(group.filter(isList), sheet), listTitle(group), 'section')
					);
				else if (section.paragraphs.length > 0) {
					const files = isAttachmentNamed ? [] : attached;
					isAttachmentNamed = true;
					sections.push(
						plain(proseParagraphs(section, sheet, files), section.heading, GAPS.paragraph)
					);
				}
				break;
			case 'headline-figures':
				if (section.figures.length > 0)
					sections.push(plain(headlineFigures(section, sheet), null, GAPS.figures));
				break;
			case 'ordering':
				if (section.rows.length > 0) sections.push(ordering(section, sheet));
				break;
			case 'ratings':
				if (section.rows.length > 0) sections.push(ratings(section, sheet));
				break;
			case 'characteristics':
				if (section.rows.length > 0) sections.push(characteristics(section, sheet));
				break;
			case 'capacitance-table':
				if (section.rows.length > 0) sections.push(capacitanceTable(section, sheet));
				break;
			case 'capacitance-chart':
				if (section.points.length > 0)
					sections.push(
						capacitanceChartSection(section, sheet, {
							figure: ++figures,
							isChanged: isCapacitanceChanged
						})
					);
				break;
			case 'revision-history':
				push(sections, revisionHistory(section, sheet));
				break;
			case 'notice':
				push(sections, notice(section, sheet));
				break;
			default:
				section satisfies never;
		}
	}
	return sections;
}

function push(sections: Section[], section: Section | null) {
	if (section !== null) sections.push(section);
}

const isList = (section: DocumentSection): section is SectionOf<'prose'> =>
	section.kind === 'prose' && section.style === 'list';

const listTitle = (group: readonly DocumentSection[]) =>
	group
		.filter(isList)
		.map(({ heading }) => heading)
		.filter((heading) => heading !== null)
		.join(', ');

/** Lists with something in them, up to three together; every other section by itself. */
function grouped(sections: readonly DocumentSection[]): DocumentSection[][] {
	const groups: DocumentSection[][] = [];
	for (const section of sections) {
		if (isList(section) && section.paragraphs.length === 0) continue;
		const last = groups.at(-1);
		const joins = isList(section) && last?.every(isList) && last.length < LISTS_IN_A_ROW;
		if (joins) last?.push(section);
		else groups.push([section]);
	}
	return groups;
}
