import { DEMO_PRODUCTS } from './products';
import { lotLines } from './sweepLines';

/** A file of the demo: one lot of one product. */
export interface DemoFile {
	readonly partNumber: string;
	readonly lot: string;
	readonly fileName: string;
	/** Its lines, header first, without line ends. */
	lines(): Generator<string>;
}

/** The files of the demo, a lot each, in the order in which they were measured. */
export function demoFiles(): DemoFile[] {
	return DEMO_PRODUCTS.flatMap((product) =>
		product.lots.map((lot) => ({
			partNumber: product.partNumber,
			lot,
			fileName: `${product.partNumber}_${lot}.csv`,
			lines: () => lotLines(product, lot)
		}))
	);
}
