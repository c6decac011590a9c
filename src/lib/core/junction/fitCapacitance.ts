import { CapacitanceFitter } from './capacitanceFit';
import {
	CONVERGED,
	FLAGS,
	IDENTIFIABLE,
	PARAMETERS,
	RESULT_WIDTH,
	RMS,
	type FixedParameters,
	type ParameterName
} from './capacitanceFitResult';
import type { CapacitanceModel } from './capacitanceModel';
import { JunctionDataError } from './errors';

/** A fitted law and how far it can be believed. */
export interface CapacitanceFit {
	readonly model: CapacitanceModel;
	/** `null` for a fixed parameter, one at its bound, or when there is nothing to judge by. */
	readonly standardErrors: Readonly<Record<ParameterName, number | null>>;
	/** Root mean square of the relative errors: 0.01 is 1 %. */
	readonly residualRms: number;
	readonly boundsHit: readonly ParameterName[];
	readonly converged: boolean;
	/** False when the readings don't tell the parameters apart. */
	readonly identifiable: boolean;
}

/** Shapes to begin with, from graded to hyperabrupt; the best of them wins. */
const STARTS = [
	{ junctionPotential: 0.6, gradingExponent: 0.35 },
	{ junctionPotential: 0.7, gradingExponent: 0.5 },
	{ junctionPotential: 1.5, gradingExponent: 1.0 },
	{ junctionPotential: 4, gradingExponent: 1.8 }
] as const;

/**
 * Fits C(V) = C_case + C_j0 (1 + V/V_j)^(−M) to one sweep, from several starts. See
 * {@link CapacitanceFitter}. A part that isn't one power law shows it by its residuals.
 *
 * @throws {JunctionDataError} when lengths differ, for fewer readings than free parameters, or for a
 * reading not above zero
 */
export function fitCapacitance(
	biases: ArrayLike<number>,
	capacitances: ArrayLike<number>,
	fixed: FixedParameters = {}
): CapacitanceFit {
	if (capacitances.length !== biases.length)
		throw new JunctionDataError(
			'capacitance fit',
			`${biases.length} capacitances`,
			capacitances.length
		);
	const fitter = new CapacitanceFitter(biases, fixed);
	const result = new Float64Array(RESULT_WIDTH);
	let best: CapacitanceFit | undefined;
	for (const start of startsFor(biases, capacitances)) {
		const { standardErrors } = fitter.fit(capacitances, 0, start, result, 0);
		const fit = describe(result, 0, standardErrors);
		if (best === undefined || fit.residualRms < best.residualRms * (1 - 1e-9)) best = fit;
	}
	if (best === undefined) throw new JunctionDataError('capacitance fit', 'a start', 0);
	return best;
}

/** Starts scaled so that each goes through the reading nearest to zero bias. */
function startsFor(biases: ArrayLike<number>, capacitances: ArrayLike<number>): CapacitanceModel[] {
	let [nearest, reading] = [Infinity, 1];
	for (let i = 0; i < biases.length; i++)
		if (Math.abs(biases[i]!) < Math.abs(nearest) && capacitances[i]! > 0)
			[nearest, reading] = [biases[i]!, capacitances[i]!];
	return STARTS.map(({ junctionPotential, gradingExponent }) => ({
		zeroBiasCapacitance:
			0.95 * reading * Math.max(0.1, 1 + nearest / junctionPotential) ** gradingExponent,
		junctionPotential,
		gradingExponent,
		caseCapacitance: 0
	}));
}

/** One row of a bulk result in words. */
export function describe(
	result: Float64Array,
	row: number,
	standardErrors: Float64Array
): CapacitanceFit {
	const at = row * RESULT_WIDTH;
	const flags = result[at + FLAGS]!;
	const errorOf = (index: number) => {
		const error = standardErrors[index]!;
		return Number.isFinite(error) ? error : null;
	};
	return {
		model: {
			zeroBiasCapacitance: result[at]!,
			junctionPotential: result[at + 1]!,
			gradingExponent: result[at + 2]!,
			caseCapacitance: result[at + 3]!
		},
		standardErrors: {
			zeroBiasCapacitance: errorOf(0),
			junctionPotential: errorOf(1),
			gradingExponent: errorOf(2),
			caseCapacitance: errorOf(3)
		},
		residualRms: result[at + RMS]!,
		boundsHit: PARAMETERS.filter((_, i) => (flags & (1 << i)) !== 0),
		converged: (flags & CONVERGED) !== 0,
		identifiable: (flags & IDENTIFIABLE) !== 0
	};
}

/**
 * Fits every row of a packed matrix (devices × biases, NaN = absent) and returns
 * devices × RESULT_WIDTH numbers. All rows start from the fit of the mean sweep, so the result of a
 * device depends on its neighbours and their order by rounding only.
 *
 * A row with fewer readings than free parameters is all NaN.
 */
export function fitSweeps(
	biases: ArrayLike<number>,
	matrix: Float64Array,
	fixed: FixedParameters = {}
): Float64Array {
	const points = biases.length;
	const devices = matrix.length / points;
	if (!Number.isInteger(devices))
		throw new JunctionDataError('capacitance fits', `rows of ${points} readings`, matrix.length);
	const result = new Float64Array(devices * RESULT_WIDTH).fill(NaN);
	if (devices === 0) return result;
	const start = fitCapacitance(biases, meanSweep(matrix, points), fixed).model;
	const fitter = new CapacitanceFitter(biases, fixed);
	const needed = PARAMETERS.length - Object.keys(fixed).length;
	for (let row = 0; row < devices; row++)
		if (countPresent(matrix, row * points, points) >= needed)
			fitter.fit(matrix, row * points, start, result, row);
	return result;
}

function countPresent(matrix: Float64Array, offset: number, points: number): number {
	let present = 0;
	for (let i = 0; i < points; i++) if (!Number.isNaN(matrix[offset + i]!)) present++;
	return present;
}

/** Mean of the readings present at each bias; NaN where there is none. */
function meanSweep(matrix: Float64Array, points: number): Float64Array {
	const sums = new Float64Array(points);
	const counts = new Float64Array(points);
	for (let i = 0; i < matrix.length; i++) {
		if (Number.isNaN(matrix[i]!)) continue;
		sums[i % points]! += matrix[i]!;
		counts[i % points]! += 1;
	}
	return sums.map((sum, i) => (counts[i]! > 0 ? sum / counts[i]! : NaN));
}
