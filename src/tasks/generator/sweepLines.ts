import { atTemperature, capacitance } from './diode';
import type { DemoProduct, DiodeLaw, Fault, Spread } from './diode';
import { Random } from './random';
import { seatOf } from './seat';

/** The header of every generated file. */
export const HEADER = 'lot,wafer,site,device,temperature [°C],frequency [Hz],V_R [V],C_tot [pF]';

/**
 * The lines of a file of some lots, header first, as a tester at probe writes them. A lot's numbers
 * depend on the product's seed and the lot's place only, so a lot can be withheld without changing
 * the others.
 */
export function* sweepFileLines(product: DemoProduct, lots: readonly string[]): Generator<string> {
	yield HEADER;
	for (const lot of lots) yield* readingLines(product, lot);
}

/** The lines of one lot, without a header. */
export function* readingLines(product: DemoProduct, lot: string): Generator<string> {
	const random = new Random(product.seed * 1009 + product.lots.indexOf(lot) * 7919);
	const ofLot = spread(product.law, product.lotSpread, random);
	for (const wafer of product.wafers) {
		const ofWafer = spread(ofLot, product.waferSpread, random);
		for (let device = 1; device <= product.devicesPerWafer; device++) {
			const law = spread(ofWafer, product.deviceSpread, random);
			const { site, name } = seatOf(device);
			for (const temperature of product.temperatures) {
				const fault = product.faults.find(
					(of) =>
						of.lot === lot &&
						of.wafer === wafer &&
						of.device === device &&
						of.temperature === temperature
				);
				const there = atTemperature(law, temperature, product.potentialDrift);
				for (const bias of product.biases) {
					const read = reading(product, there, bias, fault, random);
					yield `${lot},${wafer},${site},${name},${temperature},${product.frequency},${bias},${read}`;
				}
			}
		}
	}
}

/** What the instrument shows, as it prints it. */
function reading(
	product: DemoProduct,
	law: DiodeLaw,
	bias: number,
	fault: Fault | undefined,
	random: Random
): string {
	const noise = product.noise * random.normal();
	const steps = Math.round((faulty(law, bias, fault) + noise) / product.resolution);
	return Math.max(product.resolution, steps * product.resolution).toFixed(product.decimals);
}

function faulty(law: DiodeLaw, bias: number, fault: Fault | undefined): number {
	const value = capacitance(law, bias);
	if (fault === undefined) return value;
	switch (fault.kind) {
		case 'lostContact':
			// A needle that touches badly is a small capacitance in series.
			return 1 / (1 / value + 1 / (law.zeroBiasCapacitance / 2));
		case 'jump':
			return bias === fault.bias ? value * 1.35 : value;
		default:
			return fault.kind satisfies never;
	}
}

function spread(law: DiodeLaw, by: Spread, random: Random): DiodeLaw {
	return {
		...law,
		zeroBiasCapacitance: law.zeroBiasCapacitance * (1 + by.zeroBiasCapacitance * random.normal()),
		junctionPotential: law.junctionPotential * (1 + by.junctionPotential * random.normal()),
		gradingExponent: law.gradingExponent * (1 + by.gradingExponent * random.normal())
	};
}
