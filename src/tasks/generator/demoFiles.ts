import { DEMO_PRODUCTS } from './products';
import { currentFileLines } from './currentLines';
import { ELECTRICAL_PRODUCTS } from './electricalProducts';
import { readingFileLines } from './readingLines';
import { sweepFileLines } from './sweepLines';

/** A file of the demo. */
export interface DemoFile {
	readonly partNumber: string;
	readonly fileName: string;
	/** Its lines, header first, without line ends. */
	lines(): Generator<string>;
}

/** As many lots of a product are measured one by one, the others in one go. */
const LOTS_BY_THEMSELVES = 3;

/** The C–V sweeps of the demo in the order in which they were measured. */
export function demoFiles(): DemoFile[] {
	return DEMO_PRODUCTS.flatMap((product) => {
		const { partNumber, lots } = product;
		const first = lots.slice(0, LOTS_BY_THEMSELVES);
		const others = lots.slice(LOTS_BY_THEMSELVES);
		return [...first.map((lot) => [lot]), others].map((of) => ({
			partNumber,
			fileName: `${partNumber}_${of.length === 1 ? of[0] : `${of[0]}_to_${of.at(-1)}`}.csv`,
			lines: () => sweepFileLines(product, of)
		}));
	});
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
