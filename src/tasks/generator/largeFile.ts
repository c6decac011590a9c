import type { DemoProduct } from './diode';
import { TUNING_DIODE } from './products';
import { HEADER, readingLines } from './sweepLines';

/** A file of the tuning diode with so many readings, in lots of 40 wafers; for trying out size. */
export function* largeFileLines(points: number): Generator<string> {
	yield HEADER;
	const wafers = Array.from({ length: 40 }, (_, index) => String(index + 1).padStart(2, '0'));
	const perLot =
		wafers.length *
		TUNING_DIODE.devicesPerWafer *
		TUNING_DIODE.biases.length *
		TUNING_DIODE.temperatures.length;
	const lots = Array.from(
		{ length: Math.ceil(points / perLot) },
		(_, index) => `LK25-${String(index + 1).padStart(3, '0')}`
	);
	const product: DemoProduct = { ...TUNING_DIODE, seed: 3_300_000, lots, wafers, faults: [] };
	let left = points;
	for (const lot of lots) {
		for (const line of readingLines(product, lot)) {
			if (left === 0) return;
			left -= 1;
			yield line;
		}
	}
}
