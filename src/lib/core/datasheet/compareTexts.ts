import type { Change } from './change';
import type { DatasheetDocument } from './document';
import { documentTexts } from './documentRows';
import { drawingWordings } from './drawingWordings';
import { plainText } from './plainText';
import type { Wording } from './wording';

/** Differences in words: masthead, prose, ordering codes, notes, the notice. */
export function compareTexts(before: DatasheetDocument, after: DatasheetDocument): Change[] {
	const old = new Map(wordings(before).map((entry) => [entry.id, entry]));
	const now = new Map(wordings(after).map((entry) => [entry.id, entry]));
	const ids = new Set([...now.keys(), ...old.keys()]);
	return [...ids].flatMap((id) => compareWording(old.get(id), now.get(id)));
}

function compareWording(was: Wording | undefined, is: Wording | undefined): Change[] {
	const named = is ?? was;
	if (named === undefined || was?.text === is?.text) return [];
	const isOrdering = named.area === 'ordering';
	const kind = was && is ? 'text' : isOrdering ? (is ? 'added' : 'removed') : 'text';
	return [
		{
			kind,
			area: named.area,
			row: named.id,
			label: named.label,
			part: 'text',
			before: was?.text ?? null,
			after: is?.text ?? null,
			relative: null
		}
	];
}

function wordings(document: DatasheetDocument): Wording[] {
	const fixed = [
		['status', 'Status', document.status],
		['class', 'Class', document.className],
		['package', 'Package', document.package],
		['organization', 'Maker', document.organization.name],
		['footnotes', 'Footnotes', document.footnotes.join('\n')]
	] as const;
	return [
		...fixed.map(([id, label, text]) => ({ id, label, text, area: 'text' as const })),
		...documentTexts(document).map(({ id, label, runs }) => ({
			id,
			label,
			text: plainText(runs),
			area: 'text' as const
		})),
		...document.sections.flatMap((section) => [
			...sectionWordings(section),
			...drawingWordings(section)
		])
	];
}

function sectionWordings(section: DatasheetDocument['sections'][number]): Wording[] {
	if (section.kind === 'ordering')
		return section.rows.map((row) => ({
			id: `ordering.${row.code}`,
			label: `Ordering code ${row.code}`,
			text: `${row.package}, ${row.grade}, marking ${row.marking}, ${row.packing} of ${row.quantity}`,
			area: 'ordering'
		}));
	if (section.kind === 'notice')
		return [
			{ id: 'notice', label: section.heading, text: section.paragraphs.join('\n'), area: 'text' }
		];
	if (section.kind === 'ratings' || section.kind === 'characteristics')
		return [
			{
				id: `${section.kind}.note`,
				label: `Note to ${section.heading}`,
				text: section.note,
				area: 'text'
			}
		];
	return [];
}
