import { z } from 'zod';
import { DATASHEET_STAGES, type DatasheetStage } from '$lib/core/review/datasheetState';
import { productClass } from '$lib/core/template/template';

/** What the table of products can be sorted by. */
export const PRODUCT_COLUMNS = [
	'partNumber',
	'class',
	'package',
	'die',
	'lots',
	'datasheet'
] as const;

const isStage = (text: string): text is DatasheetStage => Object.hasOwn(DATASHEET_STAGES, text);

const filter = z.object({
	search: z.string().trim().max(200).catch(''),
	class: productClass.optional().catch(undefined),
	package: z.string().trim().min(1).optional().catch(undefined),
	state: z.string().refine(isStage).optional().catch(undefined),
	sort: z.enum(PRODUCT_COLUMNS).catch('partNumber'),
	order: z.enum(['ascending', 'descending']).catch('ascending')
});

/** How the table of products is narrowed and sorted, as its address says; the unknown is left out. */
export function readProductFilter(search: URLSearchParams) {
	const given = filter.parse(Object.fromEntries(search));
	return {
		search: given.search,
		productClass: given.class,
		package: given.package,
		stage: given.state !== undefined && isStage(given.state) ? given.state : undefined,
		column: given.sort,
		order: given.order
	};
}
