import { fitCapacitance } from '../junction/fitCapacitance';

/** V in V: near the potential of most junctions, for curves that don't tell their own. */
export const DEFAULT_JUNCTION_POTENTIAL = 0.8;

/** Three parameters are fitted; one reading more shows whether they hold. */
const FEWEST_BIASES = 4;

/** A default must stay this far above the deepest forward bias. */
const FORWARD_MARGIN = 1.25;

/**
 * The V_j with which ln C runs straightest against ln(V_R + V_j): that of the power law without a
 * case capacitance, fitted to the median curve. One value serves all sweeps of a condition, so that
 * the interpolation can be stated in one line and redone by hand; single sweeps don't scatter it.
 * It shapes the way between two readings only, so its error enters multiplied by a step of the
 * grid: 0.8 V instead of 0.6 V costs 0.4 % in the middle of a step from 0 V to 0.5 V (M = 0.5) and
 * less further out. It is given to three significant figures.
 *
 * Where the fit does not tell (few biases, a flat curve) it is {@link DEFAULT_JUNCTION_POTENTIAL}.
 *
 * @param biases in V, with the median capacitance at each
 */
export function straighteningPotential(
	biases: readonly number[],
	medians: readonly number[]
): number {
	const deepest = Math.max(0, ...biases.map((bias) => -bias));
	const fallback = Math.max(DEFAULT_JUNCTION_POTENTIAL, FORWARD_MARGIN * deepest);
	if (biases.length < FEWEST_BIASES || medians.some((median) => !(median > 0))) return fallback;
	const fit = fitCapacitance(biases, medians, { caseCapacitance: 0 });
	const isFlat = fit.boundsHit.length > 1;
	if (!fit.converged || !fit.identifiable || isFlat) return fallback;
	return Number(fit.model.junctionPotential.toPrecision(3));
}
