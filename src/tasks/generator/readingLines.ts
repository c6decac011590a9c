import { breakdownAt, forwardVoltageAt, leakageAt, spreadElectrical } from './electrical';
import type { ElectricalLaw } from './electrical';
import type { ElectricalProduct, ReadingPlan } from './electricalProducts';
import { Random } from './random';
import { seatOf } from './seat';

/** The header of every generated file of readings. */
export const READINGS_HEADER =
	'lot,wafer,site,device,characteristic,T [°C],f [MHz],V_R [V],I_F [A],I_R [mA],value,unit,flag';

/**
 * The single readings of all lots of a product, header first, as a parametric tester writes them. A
 * lot's numbers depend on the product's seed and the lot's place only.
 */
export function* readingFileLines(product: ElectricalProduct): Generator<string> {
	yield READINGS_HEADER;
	for (const { lot, wafer, device, law, random } of simulatedDevices(product, product.seed * 31)) {
		const { site, name } = seatOf(device);
		for (const plan of product.readings) {
			if (device > (plan.devicesPerWafer ?? Infinity)) continue;
			const fault = product.faults.find(
				(of) =>
					of.lot === lot &&
					of.wafer === wafer &&
					of.device === device &&
					of.characteristic === plan.characteristic
			);
			const { value, flag } = shown(plan, law, fault?.added ?? 0, random);
			const {
				frequency = '',
				reverseVoltage = '',
				forwardCurrent = '',
				reverseCurrent = ''
			} = plan;
			yield `${lot},${wafer},${site},${name},${plan.characteristic},${plan.temperature},${frequency},${reverseVoltage},${forwardCurrent},${reverseCurrent},${value},${plan.unit},${flag}`;
		}
	}
}

/** The devices of a product, each with its own law and the stream its readings go on with. */
export function* simulatedDevices(product: ElectricalProduct, seed: number) {
	for (const [place, lot] of product.lots.entries()) {
		const random = new Random(seed + place * 7919);
		const ofLot = spreadElectrical(product.law, product.lotSpread, random);
		for (const wafer of product.wafers) {
			const ofWafer = spreadElectrical(ofLot, product.waferSpread, random);
			for (let device = 1; device <= product.devicesPerWafer; device++) {
				const law = spreadElectrical(ofWafer, product.deviceSpread, random);
				yield { lot, wafer, device, law, random };
			}
		}
	}
}

/** What the instrument prints: never below its floor, never above its clamp. */
function shown(
	plan: ReadingPlan,
	law: ElectricalLaw,
	added: number,
	random: Random
): { readonly value: string; readonly flag: '' | '<' | '>' } {
	const read = (trueValue(plan, law) + added) * (1 + plan.noise * random.normal());
	const value = Number((read / plan.unitSize).toFixed(plan.decimals));
	const { floor = -Infinity, ceiling = Infinity } = plan;
	if (value <= floor) return { value: floor.toFixed(plan.decimals), flag: '<' };
	if (value >= ceiling) return { value: ceiling.toFixed(plan.decimals), flag: '>' };
	return { value: value.toFixed(plan.decimals), flag: '' };
}

/** In the SI unit of the characteristic. */
function trueValue(plan: ReadingPlan, law: ElectricalLaw): number {
	const { temperature } = plan;
	switch (plan.characteristic) {
		case 'V_F':
			return forwardVoltageAt(law, plan.forwardCurrent ?? 0, temperature);
		case 'I_R':
			return leakageAt(law, plan.reverseVoltage ?? 0, temperature);
		case 'V_(BR)':
			return breakdownAt(law, temperature);
		case 'r_s':
			return law.seriesResistance;
		case 'R_th(j-mb)':
			return law.thermalResistance;
		default:
			return plan.characteristic satisfies never;
	}
}
