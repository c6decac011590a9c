import { BOLTZMANN_IN_VOLTS } from './constants';
import { JunctionDataError } from './errors';
import { regressionLine } from '../stats/regressionLine';

/**
 * Activation energy of a leakage current in eV: minus the slope of ln I against 1/(kT), by two
 * temperatures or the line through more.
 *
 * @param temperatures - in K
 * @param currents - in A, above zero
 * @throws {JunctionDataError} for fewer than two temperatures, or a current not above zero
 */
export function activationEnergy(
	temperatures: readonly number[],
	currents: readonly number[]
): number {
	if (temperatures.length < 2)
		throw new JunctionDataError(
			'activation energy',
			'at least 2 temperatures',
			temperatures.length
		);
	const x = temperatures.map((temperature) => 1 / (BOLTZMANN_IN_VOLTS * temperature));
	const y = currents.map((current) => {
		if (!(current > 0))
			throw new JunctionDataError('activation energy', 'positive currents', current);
		return Math.log(current);
	});
	if (x.length > 2) return -regressionLine(x, y).slope;
	const span = x[1]! - x[0]!;
	if (span === 0) throw new JunctionDataError('activation energy', 'temperatures that differ', 0);
	return -(y[1]! - y[0]!) / span;
}

/** A thermally activated current in A, carried from one temperature in K to another. */
export function activatedCurrent(
	current: number,
	{ from, to, energy }: { readonly from: number; readonly to: number; readonly energy: number }
): number {
	return current * Math.exp((-energy / BOLTZMANN_IN_VOLTS) * (1 / to - 1 / from));
}
