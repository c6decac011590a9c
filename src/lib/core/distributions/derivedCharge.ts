import { CONVERGED, FLAGS, PARAMETERS, RESULT_WIDTH } from '../junction/capacitanceFitResult';
import { chargeAndEnergy } from '../junction/chargeAndEnergy';
import { fitSweeps } from '../junction/fitCapacitance';
import type { BiasColumn } from './conditionColumns';
import type { DerivedColumn } from './derivedColumn';

/** Charge in C and energy in J of each device, from 0 V to one bias. */
export interface DerivedCharge {
	readonly bias: number;
	readonly charge: DerivedColumn;
	readonly energy: DerivedColumn;
}

/**
 * Q_C = ∫C dv and E_C = ∫v·C dv of each device from 0 V to each of some measured biases, by
 * `chargeAndEnergy`: on the law fitted to the device's own sweep with what its readings depart from
 * it added. A device without a reading at 0 V or at the bias, or with fewer readings than the law
 * has parameters, has no value.
 *
 * @param columns the measured biases of one temperature and frequency, ascending
 * @param upTo biases in V; those that weren't measured are left out
 */
export function derivedCharge(
	columns: readonly BiasColumn[],
	upTo: readonly number[]
): DerivedCharge[] {
	const reverse = columns.filter(({ bias }) => bias >= 0);
	const ends = upTo.filter((end) => end > 0 && reverse.some(({ bias }) => bias === end));
	if (reverse[0]?.bias !== 0 || reverse.length < PARAMETERS.length || ends.length === 0) return [];

	const biases = reverse.map(({ bias }) => bias);
	const devices = reverse[0].values.length;
	const sweeps = new Float64Array(devices * biases.length);
	for (const [position, { values }] of reverse.entries())
		for (let device = 0; device < devices; device++)
			sweeps[device * biases.length + position] = values[device]!;
	const fits = fitSweeps(biases, sweeps);
	const found = ends.map((bias) => ({
		bias,
		charges: new Float64Array(devices).fill(Number.NaN),
		energies: new Float64Array(devices).fill(Number.NaN)
	}));
	for (let device = 0; device < devices; device++) {
		const at = device * RESULT_WIDTH;
		const first = device * biases.length;
		// The law only carries the steep part: any that ended will do, as the departures are added.
		if (Number.isNaN(sweeps[first]!) || ((fits[at + FLAGS] ?? 0) & CONVERGED) === 0) continue;
		const stored = chargeAndEnergy(biases, sweeps.subarray(first, first + biases.length), {
			zeroBiasCapacitance: fits[at]!,
			junctionPotential: fits[at + 1]!,
			gradingExponent: fits[at + 2]!,
			caseCapacitance: fits[at + 3]!
		});
		for (const end of found) {
			const there = stored.find(({ bias }) => bias === end.bias);
			if (there === undefined) continue;
			end.charges[device] = there.charge;
			end.energies[device] = there.energy;
		}
	}
	const sets = [...new Set(reverse.flatMap((of) => of.sets))].sort((a, b) => a - b);
	return found.map(({ bias, charges, energies }) => ({
		bias,
		charge: { values: charges, sets },
		energy: { values: energies, sets }
	}));
}
