import { DEMO_PRODUCTS } from './products';
import { currentFileLines } from './currentLines';
import { ELECTRICAL_PRODUCTS } from './electricalProducts';
import { readingFileLines } from './readingLines';
import { lotLines } from './sweepLines';

/** A file of the demo. */
export interface DemoFile {
	readonly partNumber: string;
	readonly fileName: string;
	/** Its lines, header first, without line ends. */
	lines(): Generator<string>;
}

/** The C–V sweeps of the demo, a lot each, in the order in which they were measured. */
export function demoFiles(): DemoFile[] {
	return DEMO_PRODUCTS.flatMap((product) =>
		product.lots.map((lot) => ({
			partNumber: product.partNumber,
			fileName: `${product.partNumber}_${lot}.csv`,
			lines: () => lotLines(product, lot)
		}))
	);
}

/** The single readings and I–V sweeps of the demo, all lots of a product in one file. */
export function electricalFiles(): DemoFile[] {
	return ELECTRICAL_PRODUCTS.flatMap((product) => {
		const { partNumber } = product;
		const readings = {
			partNumber,
			fileName: `${partNumber}_readings.csv`,
			lines: () => readingFileLines(product)
		};
		const currents = {
			partNumber,
			fileName: `${partNumber}_currents.csv`,
			lines: () => currentFileLines(product)
		};
		return product.sweeps === undefined ? [readings] : [readings, currents];
	});
}
