import { modelCapacitance, type CapacitanceModel } from './capacitanceModel';

/** How the readings depart from a fitted law. */
export interface ResidualPattern {
	/** Largest relative departure, and the bias in V where it is. */
	readonly largest: number;
	readonly at: number;
	/**
	 * Σ(rᵢ₊₁ − rᵢ)²/Σrᵢ² of the relative residuals in order of bias: 2 when they follow each other
	 * by chance, less when they run in a pattern.
	 */
	readonly successiveRatio: number;
	/** Whether chance would give so small a ratio in less than one sweep of a hundred. */
	readonly isPattern: boolean;
}

/** Quantile of the normal approximation for one in a hundred. */
const ONE_IN_HUNDRED = 2.326347874;

/** Fewer readings follow any pattern now and then. */
const FEWEST = 8;

/**
 * Whether what a fit leaves over is noise or shape. Independent residuals have a ratio of mean 2 and
 * variance 4(n − 2)/(n² − 1); fitting parameters raises the mean a little, so that the judgement is
 * on the lenient side.
 *
 * Source: von Neumann 1941, Distribution of the ratio of the mean square successive difference to
 * the variance.
 *
 * @param biases - in V, ascending
 */
export function residualPattern(
	biases: readonly number[],
	capacitances: readonly number[],
	model: CapacitanceModel
): ResidualPattern {
	const residuals = biases.map((bias, i) => modelCapacitance(model, bias) / capacitances[i]! - 1);
	let [largest, at, squares, steps] = [0, biases[0] ?? NaN, 0, 0];
	residuals.forEach((residual, i) => {
		squares += residual * residual;
		if (i > 0) steps += (residual - residuals[i - 1]!) ** 2;
		if (Math.abs(residual) > largest) [largest, at] = [Math.abs(residual), biases[i]!];
	});
	const count = residuals.length;
	const successiveRatio = squares > 0 ? steps / squares : 2;
	const spread = Math.sqrt((4 * (count - 2)) / (count * count - 1));
	const isPattern = count >= FEWEST && successiveRatio < 2 - ONE_IN_HUNDRED * spread;
	return { largest, at, successiveRatio, isPattern };
}
