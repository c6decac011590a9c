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
import { figureSection, isFigure, isHalf } from './sections/halfFigures';
import { model } from './sections/model';
import { outline } from './sections/outline';
import {
	listColumns,
	proseParagraphs,
	type AttachedFile,
	type ColumnSection
} from './sections/prose';
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
	const nextNumber = () => ++figures;
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
			case 'terminals':
				sections.push(columns(group, sheet));
				break;
			case 'prose':
				if (section.style === 'list') sections.push(columns(group, sheet));
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
			case 'thermal':
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
							figure: nextNumber(),
							isChanged: isCapacitanceChanged
						})
					);
				break;
			case 'chart':
			case 'test-circuit':
				sections.push(figureSection(group.filter(isFigure), sheet, nextNumber));
				break;
			case 'outline':
				sections.push(outline(section, sheet, nextNumber));
				break;
			case 'model':
				sections.push(model(section, sheet));
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

function columns(group: readonly DocumentSection[], sheet: Sheet): Section {
	const sections = group.filter(isColumn);
	const title = sections
		.map(({ heading }) => heading)
		.filter((heading) => heading !== null)
		.join(', ');
	return plain(listColumns(sections, sheet), title, 'section');
}

const isList = (section: DocumentSection): section is SectionOf<'prose'> =>
	section.kind === 'prose' && section.style === 'list';

const isColumn = (section: DocumentSection): section is ColumnSection =>
	isList(section) || section.kind === 'terminals';

/** Sections that share a row: up to three lists, up to two half figures. */
const ROWS = [
	{ belongs: isColumn, most: LISTS_IN_A_ROW },
	{ belongs: isHalf, most: 2 }
] as const;

/** Lists with something in them and half figures in rows; every other section by itself. */
function grouped(sections: readonly DocumentSection[]): DocumentSection[][] {
	const groups: DocumentSection[][] = [];
	for (const section of sections) {
		if (isList(section) && section.paragraphs.length === 0) continue;
		const last = groups.at(-1);
		const joins = ROWS.some(
			({ belongs, most }) => belongs(section) && last?.every(belongs) && last.length < most
		);
		if (joins) last?.push(section);
		else groups.push([section]);
	}
	return groups;
}
