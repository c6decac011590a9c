import { choleskyRoot } from '$lib/core/stats/choleskyRoot';
import type { CurveCovariance } from '$lib/core/stats/curveSimulator';
import type { Draws } from './draws';

/** Points of the curve, from the lowest bias to the highest. */
export const POINTS = 8;

/**
 * Covariance of ln C along a curve, with variance 1 everywhere: a scale common to all points, a
 * slope from the grading of the junction, and what is left at each point alone.
 */
function curveMatrix(variance: number, slope: number, rest: number): Float64Array {
	const height = (point: number) => (2 * point) / (POINTS - 1) - 1;
	const raw = (i: number, j: number) => 1 + slope * height(i) * height(j) + (i === j ? rest : 0);
	return Float64Array.from({ length: POINTS * POINTS }, (_, at) => {
		const [i, j] = [Math.floor(at / POINTS), at % POINTS];
		return (variance * raw(i, j)) / Math.sqrt(raw(i, i) * raw(j, j));
	});
}

/** What one sample shows of a curve. */
export interface CurveSample {
	readonly means: Float64Array;
	readonly covariance: CurveCovariance;
}

/** A population of curves: lots differ more in scale, devices more in slope. */
export interface CurvePopulation {
	readonly between: Float64Array;
	readonly within: Float64Array;
	readonly drawSample: (lots: number, size: number, draws: Draws) => CurveSample;
	readonly drawDevices: (count: number, draws: Draws) => Float64Array;
}

export function curvePopulation(lotShare: number): CurvePopulation {
	const between = curveMatrix(lotShare, 0.2, 0.02);
	const within = curveMatrix(1 - lotShare, 0.6, 0.1);
	const [ofLots, ofDevices] = [choleskyRoot(between, POINTS), choleskyRoot(within, POINTS)];
	return {
		between,
		within,
		drawDevices: (count, { normal }) => {
			const devices = new Float64Array(count * POINTS);
			for (let d = 0; d < count; d++) {
				addDraw(devices, d * POINTS, ofLots, 1, normal);
				addDraw(devices, d * POINTS, ofDevices, 1, normal);
			}
			return devices;
		},
		drawSample: (lots, size, draws) => {
			const lotMeans = new Float64Array(lots * POINTS);
			for (let lot = 0; lot < lots; lot++) {
				addDraw(lotMeans, lot * POINTS, ofLots, 1, draws.normal);
				addDraw(lotMeans, lot * POINTS, ofDevices, 1 / Math.sqrt(size), draws.normal);
			}
			const means = columnMeans(lotMeans, lots);
			const withinDegrees = lots * (size - 1);
			return {
				means,
				covariance: {
					points: POINTS,
					lots,
					effectiveSize: size,
					withinDegrees,
					ofLotMeans: covarianceAbout(lotMeans, means, lots),
					withinLots: drawCovariance(ofDevices, withinDegrees, draws)
				}
			};
		}
	};
}

/** Adds scale · root · (normal draws) to a row. */
function addDraw(
	rows: Float64Array,
	at: number,
	root: Float64Array,
	scale: number,
	normal: () => number
): void {
	for (let column = 0; column < POINTS; column++) {
		const draw = scale * normal();
		for (let p = column; p < POINTS; p++) rows[at + p]! += root[p * POINTS + column]! * draw;
	}
}

function columnMeans(rows: Float64Array, count: number): Float64Array {
	const means = new Float64Array(POINTS);
	for (let i = 0; i < rows.length; i++) means[i % POINTS]! += rows[i]! / count;
	return means;
}

function covarianceAbout(rows: Float64Array, means: Float64Array, count: number): Float64Array {
	const matrix = new Float64Array(POINTS * POINTS);
	for (let row = 0; row < count; row++)
		for (let i = 0; i < POINTS; i++)
			for (let j = 0; j < POINTS; j++)
				matrix[i * POINTS + j]! +=
					((rows[row * POINTS + i]! - means[i]!) * (rows[row * POINTS + j]! - means[j]!)) /
					(count - 1);
	return matrix;
}

/** A covariance of many degrees of freedom by Bartlett's triangle: root · T · Tᵀ · rootᵀ / degrees. */
function drawCovariance(root: Float64Array, degrees: number, draws: Draws): Float64Array {
	const factor = new Float64Array(POINTS * POINTS);
	for (let row = 0; row < POINTS; row++)
		for (let column = 0; column <= row; column++) {
			const entry = column < row ? draws.normal() : Math.sqrt(draws.chiSquare(degrees - column));
			for (let p = row; p < POINTS; p++)
				factor[p * POINTS + column]! += root[p * POINTS + row]! * entry;
		}
	const matrix = new Float64Array(POINTS * POINTS);
	for (let i = 0; i < POINTS; i++)
		for (let j = 0; j < POINTS; j++) {
			let sum = 0;
			for (let column = 0; column < POINTS; column++)
				sum += factor[i * POINTS + column]! * factor[j * POINTS + column]!;
			matrix[i * POINTS + j] = sum / degrees;
		}
	return matrix;
}
