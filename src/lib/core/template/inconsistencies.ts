import { SECOND_FORMAT_KINDS, type Template, type TemplateSection } from './template';

interface Inconsistency {
	readonly path: readonly (string | number)[];
	readonly message: string;
}

/** What the shape of a template can't say: unique keys, and references that lead somewhere. */
export function inconsistencies({
	format,
	sections
}: Pick<Template, 'format' | 'sections'>): Inconsistency[] {
	return [
		...(format === 'platen-template-1' ? tooNew(sections) : []),
		...repeatedKeys(sections),
		...sections.flatMap((section, at) => within(section, at, sections))
	];
}

function tooNew(sections: readonly TemplateSection[]): Inconsistency[] {
	return sections.flatMap(({ kind }, at) =>
		SECOND_FORMAT_KINDS.has(kind)
			? [{ path: [at, 'kind'], message: `expected a template of format 2 for a section "${kind}"` }]
			: []
	);
}

/** The slots and text blocks a section declares, with where each stands. */
function declared(
	section: TemplateSection,
	at: number
): { key: string; path: (string | number)[] }[] {
	switch (section.kind) {
		case 'prose':
			return [{ key: section.block, path: [at, 'block'] }];
		case 'capacitance-table':
			return [{ key: section.slot, path: [at, 'slot'] }];
		case 'ratings':
		case 'thermal':
		case 'characteristics':
			return section.slots.map(({ slot }, index) => ({
				key: slot,
				path: [at, 'slots', index, 'slot']
			}));
		case 'masthead':
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
}

function repeatedKeys(sections: readonly TemplateSection[]): Inconsistency[] {
	const seen = new Set<string>();
	return sections.flatMap(declared).flatMap(({ key, path }) => {
		const isRepeated = seen.has(key);
		seen.add(key);
		return isRepeated ? [{ path, message: `expected a key used once, got "${key}" again` }] : [];
	});
}

function within(
	section: TemplateSection,
	at: number,
	sections: readonly TemplateSection[]
): Inconsistency[] {
	if (section.kind === 'capacitance-table') {
		const { biases, ratioTo } = section;
		const isRising = biases.every((bias, index) => index === 0 || bias > (biases[index - 1] ?? 0));
		return [
			...(isRising ? [] : [{ path: [at, 'biases'], message: 'expected biases that rise' }]),
			...(ratioTo === null || biases.includes(ratioTo)
				? []
				: [{ path: [at, 'ratioTo'], message: `expected one of the biases, got ${ratioTo}` }])
		];
	}
	const table = tableReference(section, at);
	if (table !== null) {
		const isThere = sections.some(
			(other) => other.kind === 'capacitance-table' && other.slot === table.key
		);
		return isThere
			? []
			: [{ path: table.path, message: `expected the slot of a table, got "${table.key}"` }];
	}
	if (section.kind === 'headline-figures') {
		return section.slots.flatMap((slot, index) =>
			leadsSomewhere(slot, sections)
				? []
				: [
						{
							path: [at, 'slots', index],
							message: `expected a slot of this template, got "${slot}"`
						}
					]
		);
	}
	return [];
}

/** The table a section is drawn or fitted from, with where the section names it. */
function tableReference(
	section: TemplateSection,
	at: number
): { readonly key: string; readonly path: (string | number)[] } | null {
	if (section.kind === 'capacitance-chart' || section.kind === 'model')
		return { key: section.table, path: [at, 'table'] };
	if (section.kind === 'chart' && section.source.from === 'table')
		return { key: section.source.table, path: [at, 'source', 'table'] };
	return null;
}

/** A slot's own key, or that of a table with one of its biases: `capacitance.25c.4`. */
function leadsSomewhere(slot: string, sections: readonly TemplateSection[]): boolean {
	return sections.some((section, at) =>
		section.kind === 'capacitance-table'
			? section.biases.some((bias) => slot === `${section.slot}.${bias}`)
			: section.kind !== 'prose' && declared(section, at).some(({ key }) => key === slot)
	);
}
