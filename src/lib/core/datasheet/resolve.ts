import { CLASS_NAMES, type TemplateSection } from '../template/template';
import { sheetTexts } from '../messages/datasheet';
import { basisNotes } from './basisNotes';
import { checkContradictions } from './checkContradictions';
import { checkStatus } from './checkStatus';
import type { DatasheetDocument, DocumentSection } from './document';
import { findPlaces } from './findPlaces';
import { footnotes } from './footnotes';
import { isPrinted, type Place } from './place';
import type { DraftProblem, Resolved, ResolveInput } from './resolveInput';
import { resolveChart } from './resolveChart';
import { resolveHeadline } from './resolveHeadline';
import { resolveModel } from './resolveModel';
import { resolveOutline } from './resolveOutline';
import { resolveProse } from './resolveProse';
import { characteristicRowOf, ratingRowOf } from './resolveRows';
import { chartOf, resolveTable } from './resolveTable';
import { resolveTerminals } from './resolveTerminals';
import { symbolRuns } from './symbolRuns';

/**
 * Makes a datasheet out of its parts. Pure: the same parts give the same document, byte by byte.
 *
 *   places      template × bindings × limits, each with its state
 *   → sections  twice: every place for the proof, the printed ones for what submitting freezes
 *   → notes     what the basis marks mean, footnotes, what was left out
 *   → problems  texts that can't be filled, contradictions, what the status asks
 */
export function resolve(input: ResolveInput): Resolved {
	const places = findPlaces(input);
	const standing = places.filter(({ state }) => state !== 'struck out');
	const settled = standing.filter(({ state }) => state !== 'unbound');
	return {
		proof: documentOf(input, standing),
		document: documentOf(input, settled),
		slots: places,
		open: places.filter(({ state }) => OPEN.has(state)),
		problems: problemsOf(input, places)
	};
}

const OPEN = new Set<Place['state']>(['unbound', 'stale', 'unsupported']);

function documentOf(input: ResolveInput, shown: readonly Place[]): DatasheetDocument {
	const { product, organization, template, templateNumber, status } = input;
	const sections = template.sections.flatMap((section, index) =>
		sectionOf(input, section, index, shown)
	);
	return {
		format: template.format === 'platen-template-1' ? 'platen-datasheet-1' : 'platen-datasheet-2',
		partNumber: product.partNumber,
		productClass: product.productClass,
		className: CLASS_NAMES[product.productClass],
		package: product.package,
		description: product.description,
		status,
		organization: {
			name: organization.name,
			paper: organization.paper,
			language: organization.language
		},
		template: { key: template.key, number: templateNumber },
		sections,
		basisNotes: basisNotes(shown),
		footnotes: footnotes(status, shown, sections)
	};
}

/** One section of the document; none where it would stand empty. */
function sectionOf(
	input: ResolveInput,
	section: TemplateSection,
	index: number,
	shown: readonly Place[]
): DocumentSection[] {
	const own = shown.filter((place) => place.section === index);
	switch (section.kind) {
		case 'masthead':
			return [{ kind: 'masthead' }];
		case 'prose': {
			const resolved = resolveProse(section, input.texts.get(section.block) ?? '', shown).section;
			return resolved.paragraphs.length === 0 ? [] : [resolved];
		}
		case 'headline-figures': {
			const resolved = resolveHeadline(section.slots, shown);
			return resolved.figures.length === 0 ? [] : [resolved];
		}
		case 'terminals':
			return [resolveTerminals(section, input)];
		case 'ordering':
			return input.orderingCodes.length === 0 ? [] : [orderingOf(input, section.heading)];
		case 'ratings': {
			const { kind, heading, note = sheetTexts.limitingValues() } = section;
			return own.length === 0 ? [] : [{ kind, heading, note, rows: own.map(ratingRowOf) }];
		}
		case 'thermal': {
			const { kind, heading } = section;
			return own.length === 0 ? [] : [{ kind, heading, rows: own.map(characteristicRowOf) }];
		}
		case 'characteristics': {
			const { kind, heading } = section;
			const note = sheetTexts.characteristicsNote();
			return own.length === 0 ? [] : [{ kind, heading, note, rows: own.map(characteristicRowOf) }];
		}
		case 'capacitance-table':
			return own.length === 0 ? [] : [resolveTable(section, own)];
		case 'capacitance-chart': {
			const chart = chartOf(section.heading, tableOf(input, section.table, shown));
			return chart.points.length < 2 ? [] : [chart];
		}
		case 'chart': {
			const { source } = section;
			const table = source.from === 'table' ? tableOf(input, source.table, shown) : null;
			return present(resolveChart(section, input, table));
		}
		case 'outline':
			return present(resolveOutline(section, input));
		case 'test-circuit': {
			const { kind, heading, circuit, caption, measures } = section;
			if (!shown.some((place) => place.name === measures && isPrinted(place))) return [];
			return [{ kind, heading, circuit, caption: symbolRuns(caption) }];
		}
		case 'model': {
			const table = tableOf(input, section.table, shown);
			return present(resolveModel(section.heading, input, table, shown));
		}
		case 'revision-history':
			return [{ kind: 'revision-history', heading: section.heading }];
		case 'notice':
			return [
				{ kind: 'notice', heading: section.heading, paragraphs: [...input.organization.notice] }
			];
		default:
			return section satisfies never;
	}
}

function orderingOf({ orderingCodes, product }: ResolveInput, heading: string): DocumentSection {
	return {
		kind: 'ordering',
		heading,
		rows: orderingCodes.map(({ code, grade, marking, packing, quantity }) => ({
			code,
			package: product.package,
			grade,
			marking,
			packing,
			quantity
		}))
	};
}

const present = <Section>(section: Section | null): Section[] =>
	section === null ? [] : [section];

/** The table a chart or a model is made from, as it is printed. */
function tableOf({ template }: ResolveInput, table: string, shown: readonly Place[]) {
	const from = template.sections.find(
		(section) => section.kind === 'capacitance-table' && section.slot === table
	);
	// The template's own check has made sure that the table is there.
	if (from?.kind !== 'capacitance-table') throw new ChartWithoutTableError(table);
	const rows = shown.filter(({ slot }) => slot === table);
	return resolveTable(from, rows);
}

/** A chart that names a table its template hasn't. */
export class ChartWithoutTableError extends Error {
	override readonly name = 'ChartWithoutTableError';

	constructor(readonly table: string) {
		super(`chart requires the table "${table}" in its template, got none`);
	}
}

function problemsOf(input: ResolveInput, places: readonly Place[]): DraftProblem[] {
	const prose = input.template.sections.flatMap((section) =>
		section.kind === 'prose'
			? resolveProse(section, input.texts.get(section.block) ?? '', places).problems
			: []
	);
	return [...prose, ...checkContradictions(places), ...checkStatus(input.status, places)];
}
