import { forwardCurrent } from '$lib/core/junction/forwardCurrent';
import { forwardAt, leakageAt } from './electrical';
import type { ElectricalLaw } from './electrical';
import type { ElectricalProduct } from './electricalProducts';
import { simulatedDevices } from './readingLines';
import { seatOf } from './seat';

/** The header of every generated file of I–V sweeps. */
export const CURRENTS_HEADER = 'lot,wafer,site,device,T [°C],V [V],I [mA]';

/** Figures the instrument prints, and the relative standard deviation of one reading. */
const FIGURES = 5;
const NOISE = 0.002;

/** The I–V sweeps of all lots of a product, header first; forward is positive, as in most files. */
export function* currentFileLines(product: ElectricalProduct): Generator<string> {
	yield CURRENTS_HEADER;
	const { sweeps } = product;
	if (sweeps === undefined) return;
	for (const { lot, wafer, device, law, random } of simulatedDevices(product, product.seed * 31)) {
		if (device > sweeps.devicesPerWafer) continue;
		const { site, name } = seatOf(device);
		for (const temperature of sweeps.temperatures) {
			for (const bias of sweeps.biases) {
				const read = 1000 * currentAt(law, bias, temperature) * (1 + NOISE * random.normal());
				yield `${lot},${wafer},${site},${name},${temperature},${bias},${Number(read.toPrecision(FIGURES))}`;
			}
		}
	}
}

/** In A; the bias in V, forward positive. */
function currentAt(law: ElectricalLaw, bias: number, celsius: number): number {
	if (bias < 0) return -leakageAt(law, -bias, celsius);
	return forwardCurrent(forwardAt(law, celsius), bias, celsius + 273.15);
}
