import { junctionMessages as say } from '../messages/junction';
import { effectiveDensityOfStates } from './bandStates';
import { PARAMETERS } from './capacitanceFitResult';
import { chargeAndEnergy, type StoredCharge } from './chargeAndEnergy';
import type { DieFacts } from './dieFacts';
import { fitCapacitance, type CapacitanceFit } from './fitCapacitance';
import { modelWarnings } from './modelWarnings';
import { orderSweep } from './orderSweep';
import type { LineSettings } from './reciprocalSquareLine';

const ZERO_CELSIUS = 273.15;

/** A sweep of medians, ascending: V and F. */
export interface Sweep {
	readonly biases: readonly number[];
	readonly capacitances: readonly number[];
}

/** What the median sweep of a product says of its junction. */
export interface MedianJunction {
	readonly fit: CapacitanceFit;
	/** Charge and energy at the highest measured bias; `null` without a reading at 0 V. */
	readonly charge: StoredCharge | null;
	/** What a person must know before believing the fit. */
	readonly warnings: readonly string[];
}

/**
 * The law through a sweep of medians, and the charge and energy stored up to its highest bias.
 *
 * @returns `undefined` where the law has more parameters than the sweep has biases, or the sweep
 * does not fall with bias
 */
export function medianJunction(sweep: Sweep): MedianJunction | undefined {
	const { biases, capacitances } = sweep;
	const [first, last] = [capacitances[0], capacitances.at(-1)];
	if (biases.length < PARAMETERS.length || first === undefined || last === undefined)
		return undefined;
	if (!(last > 0 && first > last)) return undefined;
	const fit = fitCapacitance(biases, capacitances);
	const charge = biases.includes(0)
		? (chargeAndEnergy(biases, capacitances, fit.model).at(-1) ?? null)
		: null;
	return {
		fit,
		charge,
		warnings: [
			...modelWarnings(fit, orderSweep(biases, capacitances), 0),
			...(charge === null ? [say.noChargeWithoutZero()] : [])
		]
	};
}

/** What the 1/C² line of a die is read with, at a temperature in °C. */
export function lineSettings(
	die: DieFacts,
	temperatureCelsius: number
): Omit<LineSettings, 'window' | 'caseCapacitance'> {
	const temperature = temperatureCelsius + ZERO_CELSIUS;
	return {
		area: die.area,
		relativePermittivity: die.material.relativePermittivity,
		temperature,
		junction: die.junction,
		effectiveDensityOfStates: effectiveDensityOfStates(die, temperature)
	};
}
