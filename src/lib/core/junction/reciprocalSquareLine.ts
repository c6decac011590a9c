import { regressionLine } from '../stats/regressionLine';
import { ELEMENTARY_CHARGE, thermalVoltage, VACUUM_PERMITTIVITY } from './constants';
import type { JunctionKind } from './dieFacts';
import { JunctionDataError } from './errors';

/** What the line is read with. SI units. */
export interface LineSettings {
	/** Junction area in m². */
	readonly area: number;
	readonly relativePermittivity: number;
	/** In K. */
	readonly temperature: number;
	readonly junction: JunctionKind;
	/** Taken off every reading first, in F. Default 0. */
	readonly caseCapacitance?: number;
	/**
	 * Effective density of states of the band the carriers are in (N_C for n-type, N_V for p-type),
	 * in m⁻³: needed for a barrier height.
	 */
	readonly effectiveDensityOfStates?: number;
	/** Biases used, both ends included. Default: all. */
	readonly window?: readonly [number, number];
}

export interface ReciprocalSquareLine {
	/** d(1/C²)/dV_R in 1/(F²V), and 1/C² at zero bias in 1/F². */
	readonly slope: number;
	readonly intercept: number;
	/** Net doping N of the lightly doped side in m⁻³. */
	readonly doping: number;
	/** Where the line meets 1/C² = 0, as a positive voltage V_i. */
	readonly voltageIntercept: number;
	/** V_bi: V_i + kT/q, for a p–n junction V_i + 2kT/q. */
	readonly builtInPotential: number;
	/** φ_B in V; `null` for a p–n junction or without a density of states. */
	readonly barrierHeight: number | null;
	readonly r2: number;
	/** Largest departure from the line as a share of the span of 1/C²; the sign tells its bend. */
	readonly curvature: number;
	/** Whether that is too much to read one doping from the line. */
	readonly isCurved: boolean;
	readonly points: number;
}

/** A departure of two per cent of the span is seen by eye on the plot. */
const CURVED_FROM = 0.02;

/**
 * The line through 1/C² against reverse bias, and what it says of a uniformly doped one-sided
 * junction: 1/C² = 2 (V_i + V_R)/(q ε_s N A²). For a metal on a semiconductor V_bi = V_i + kT/q and
 * φ_B = V_i + V_n + kT/q with V_n = (kT/q) ln(N_C/N); the metal's share of the drop is negligible.
 *
 * Source: Sze 1981, sections 2.3 and 5.3.
 *
 * @throws {JunctionDataError} for fewer than three points in the window, a reading that the case
 * capacitance uses up, or a line that does not rise
 */
export function reciprocalSquareLine(
	biases: ArrayLike<number>,
	capacitances: ArrayLike<number>,
	settings: LineSettings
): ReciprocalSquareLine {
	const { area, relativePermittivity, temperature, junction } = settings;
	const { x, y } = windowed(biases, capacitances, settings);
	if (x.length < 3)
		throw new JunctionDataError('1/C² line', 'at least 3 points in the window', x.length);
	const line = regressionLine(x, y);
	if (!(line.slope > 0)) throw new JunctionDataError('1/C² line', 'a rising line', line.slope);
	const permittivity = relativePermittivity * VACUUM_PERMITTIVITY;
	const doping = 2 / (ELEMENTARY_CHARGE * permittivity * area * area * line.slope);
	const voltageIntercept = line.intercept / line.slope;
	const vt = thermalVoltage(temperature);
	const builtInPotential = voltageIntercept + (junction === 'p-n' ? 2 : 1) * vt;
	const states = settings.effectiveDensityOfStates;
	const hasBarrier = junction === 'metal-semiconductor' && states !== undefined;
	const curvature = bend(x, y, line.intercept, line.slope);
	return {
		slope: line.slope,
		intercept: line.intercept,
		doping,
		voltageIntercept,
		builtInPotential,
		barrierHeight: hasBarrier ? builtInPotential + vt * Math.log(states / doping) : null,
		r2: line.correlation ** 2,
		curvature,
		isCurved: Math.abs(curvature) > CURVED_FROM,
		points: x.length
	};
}

/** Biases and 1/C² of the points inside the window; absent readings (NaN) left out. */
function windowed(
	biases: ArrayLike<number>,
	capacitances: ArrayLike<number>,
	{ caseCapacitance = 0, window = [-Infinity, Infinity] }: LineSettings
) {
	const x: number[] = [];
	const y: number[] = [];
	for (let i = 0; i < biases.length; i++) {
		const bias = biases[i]!;
		const reading = capacitances[i]!;
		if (Number.isNaN(reading) || bias < window[0] || bias > window[1]) continue;
		const junctionCapacitance = reading - caseCapacitance;
		if (!(junctionCapacitance > 0))
			throw new JunctionDataError('1/C² line', 'readings above the case', junctionCapacitance);
		x.push(bias);
		y.push(1 / (junctionCapacitance * junctionCapacitance));
	}
	return { x, y };
}

/** The departure from the line that is largest in size, over the span of y. */
function bend(
	x: readonly number[],
	y: readonly number[],
	intercept: number,
	slope: number
): number {
	let largest = 0;
	for (let i = 0; i < x.length; i++) {
		const departure = y[i]! - intercept - slope * x[i]!;
		if (Math.abs(departure) > Math.abs(largest)) largest = departure;
	}
	return largest / (Math.max(...y) - Math.min(...y));
}
