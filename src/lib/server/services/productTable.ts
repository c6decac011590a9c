import { CLASS_NAMES, type ProductClass } from '$lib/core/template/template';
import {
	datasheetStateText,
	isAtStage,
	type DatasheetStage,
	type DatasheetState
} from '$lib/core/review/datasheetState';
import type { Database } from '../db/database';
import { listDatasheetStates } from '../db/listDatasheetStates';
import { listMeasuredTemperatures } from '../db/listMeasuredTemperatures';
import { listProducts } from '../db/listProducts';

export interface ProductRow {
	readonly partNumber: string;
	readonly productClass: ProductClass;
	readonly className: string;
	readonly package: string;
	readonly description: string;
	readonly elements: number;
	readonly dieName: string;
	/** Independent lots that were measured. */
	readonly lots: number;
	/** Junction temperatures with distributions, rising. */
	readonly temperaturesCelsius: readonly number[];
	readonly datasheet: DatasheetState;
	readonly datasheetText: string;
}

export type ProductColumn = 'partNumber' | 'class' | 'package' | 'die' | 'lots' | 'datasheet';

/** What narrows and orders the table; left out means all, by part number. */
export interface ProductSelection {
	readonly search?: string | undefined;
	readonly productClass?: string | undefined;
	readonly package?: string | undefined;
	readonly stage?: DatasheetStage | undefined;
	readonly column?: ProductColumn | undefined;
	readonly order?: 'ascending' | 'descending' | undefined;
}

const NO_DATASHEET: DatasheetState = { release: null, openRevision: null, draft: null };

/** Every product as the table shows it. */
export async function listProductRows(db: Database, today: string): Promise<ProductRow[]> {
	const [products, states, temperatures] = await Promise.all([
		listProducts(db),
		listDatasheetStates(db, today),
		listMeasuredTemperatures(db)
	]);
	return products.map(({ id, ...row }) => {
		const datasheet = states.get(id) ?? NO_DATASHEET;
		return {
			...row,
			className: CLASS_NAMES[row.productClass],
			temperaturesCelsius: temperatures.get(id) ?? [],
			datasheet,
			datasheetText: datasheetStateText(datasheet)
		};
	});
}

/** The rows that a selection asks for, in its order. */
export function selectProducts(
	rows: readonly ProductRow[],
	selection: ProductSelection
): ProductRow[] {
	const words = (selection.search ?? '').toLowerCase().split(/\s+/).filter(Boolean);
	const isWanted = (row: ProductRow) => {
		const text = [row.partNumber, row.description, row.package, row.dieName, row.className]
			.join('\n')
			.toLowerCase();
		return (
			words.every((word) => text.includes(word)) &&
			(selection.productClass === undefined || row.productClass === selection.productClass) &&
			(selection.package === undefined || row.package === selection.package) &&
			(selection.stage === undefined || isAtStage(row.datasheet, selection.stage))
		);
	};
	const direction = selection.order === 'descending' ? -1 : 1;
	const compare = COMPARISONS[selection.column ?? 'partNumber'];
	return rows
		.filter(isWanted)
		.toSorted((a, b) => direction * compare(a, b) || COMPARISONS.partNumber(a, b));
}

/** `LKT-900` before `LKT-1130`: digits compare as numbers. */
const collator = new Intl.Collator('en', { numeric: true });

const COMPARISONS: Record<ProductColumn, (a: ProductRow, b: ProductRow) => number> = {
	partNumber: (a, b) => collator.compare(a.partNumber, b.partNumber),
	class: (a, b) => collator.compare(a.className, b.className),
	package: (a, b) => collator.compare(a.package, b.package),
	die: (a, b) => collator.compare(a.dieName, b.dieName),
	lots: (a, b) => a.lots - b.lots,
	datasheet: (a, b) => collator.compare(a.datasheetText, b.datasheetText)
};
