import { regressionLine } from '../stats/regressionLine';
import { thermalVoltage } from './constants';
import { JunctionDataError } from './errors';
import { forwardVoltage, type ForwardModel } from './forwardCurrent';

/** The straight part of ln I against V. */
export interface SemilogarithmicLine {
	readonly ideality: number;
	readonly saturationCurrent: number;
}

/**
 * Ideality and saturation current from the slope and the intercept of ln I against V, over the
 * points given: choose them where I ≫ I_s and I·R_s is still small.
 *
 * @param temperature - in K
 * @throws {JunctionDataError} for fewer than two points, a current not above zero, or no rise
 */
export function semilogarithmicLine(
	voltages: readonly number[],
	currents: readonly number[],
	temperature: number
): SemilogarithmicLine {
	const logs = logarithms(currents, 2);
	const [x0, x1, y0, y1] = [voltages[0]!, voltages[1]!, logs[0]!, logs[1]!];
	const line =
		logs.length > 2
			? regressionLine(voltages, logs)
			: { slope: (y1 - y0) / (x1 - x0), intercept: y0 - (x0 * (y1 - y0)) / (x1 - x0) };
	if (!(line.slope > 0)) throw new JunctionDataError('forward line', 'a rising line', line.slope);
	return {
		ideality: 1 / (line.slope * thermalVoltage(temperature)),
		saturationCurrent: Math.exp(line.intercept)
	};
}

/** Schottky barrier in V behind a saturation current: kT/q · ln(A A* T²/I_s). */
export function barrierFromSaturation(
	saturationCurrent: number,
	settings: { readonly area: number; readonly richardson: number; readonly temperature: number }
): number {
	const { area, richardson, temperature } = settings;
	const prefactor = area * richardson * temperature * temperature;
	return thermalVoltage(temperature) * Math.log(prefactor / saturationCurrent);
}

/** What Cheung's two functions give. */
export interface CheungResult {
	readonly ideality: number;
	/** R_s from dV/d ln I, and again from H(I): a check of each other. */
	readonly seriesResistance: number;
	readonly seriesResistanceAgain: number;
	/** φ_B in V, from H(I). */
	readonly barrierHeight: number;
}

/**
 * Cheung and Cheung's method: dV/d ln I = I R_s + n kT/q, then
 * H = V − n (kT/q) ln(I/(A A* T²)) = I R_s + n φ_B.
 *
 * Source: Cheung and Cheung 1986, Applied Physics Letters 49.
 *
 * @param derivatives - dV/d ln I in V at each point; default: parabolas through neighbours
 * @param settings - area in m², Richardson constant in A/(m²K²), temperature in K
 * @throws {JunctionDataError} for fewer than three points, or a current not above zero
 */
export function cheung(
	voltages: readonly number[],
	currents: readonly number[],
	settings: { readonly area: number; readonly richardson: number; readonly temperature: number },
	derivatives: readonly number[] = slopes(voltages, logarithms(currents, 3))
): CheungResult {
	logarithms(currents, 3);
	const vt = thermalVoltage(settings.temperature);
	const first = regressionLine(currents, derivatives);
	const ideality = first.intercept / vt;
	const prefactor = settings.area * settings.richardson * settings.temperature ** 2;
	const heights = voltages.map(
		(voltage, i) => voltage - ideality * vt * Math.log(currents[i]! / prefactor)
	);
	const second = regressionLine(currents, heights);
	return {
		ideality,
		seriesResistance: first.slope,
		seriesResistanceAgain: second.slope,
		barrierHeight: second.intercept / ideality
	};
}

/** dV/d ln I at each point of a sweep, by the parabola through it and its neighbours. */
function slopes(voltages: readonly number[], logs: readonly number[]): number[] {
	const last = voltages.length - 1;
	return voltages.map((_, i) => {
		const middle = Math.min(Math.max(i, 1), last - 1);
		const [x0, x1, x2] = [logs[middle - 1]!, logs[middle]!, logs[middle + 1]!];
		const [y0, y1, y2] = [voltages[middle - 1]!, voltages[middle]!, voltages[middle + 1]!];
		const x = logs[i]!;
		return (
			(y0 * (2 * x - x1 - x2)) / ((x0 - x1) * (x0 - x2)) +
			(y1 * (2 * x - x0 - x2)) / ((x1 - x0) * (x1 - x2)) +
			(y2 * (2 * x - x0 - x1)) / ((x2 - x0) * (x2 - x1))
		);
	});
}

/** ln of the currents, checked. */
function logarithms(currents: readonly number[], fewest: number): number[] {
	if (currents.length < fewest)
		throw new JunctionDataError('forward fit', `at least ${fewest} points`, currents.length);
	return currents.map((current) => {
		if (!(current > 0)) throw new JunctionDataError('forward fit', 'positive currents', current);
		return Math.log(current);
	});
}

/** A fitted forward diode, and the root mean square of what is left, in V. */
export interface ForwardFit {
	readonly model: ForwardModel;
	readonly residualRms: number;
	readonly converged: boolean;
}

/**
 * n, I_s and R_s from a forward sweep by least squares in voltage, V = n (kT/q) ln(I/I_s + 1) + I R_s.
 * Where I ≫ I_s this is linear in (n kT/q, n kT/q·ln I_s, R_s): that is the start, and Gauss–Newton
 * steps bring in the + 1.
 *
 * @param temperature - in K
 * @throws {JunctionDataError} for fewer than four points, or a current not above zero
 */
export function fitForward(
	voltages: readonly number[],
	currents: readonly number[],
	temperature: number
): ForwardFit {
	const logs = logarithms(currents, 4);
	const vt = thermalVoltage(temperature);
	let [scale, logSaturation, resistance] = [vt, 0, 0];
	let converged = false;
	/** In the first round 1/(1 + I_s/I) is taken as 1, which makes the problem linear. */
	for (let round = 0; round < 100 && !converged; round++) {
		const start = round === 0;
		const rows = currents.map((current, i) => {
			const relative = start ? 0 : Math.exp(logSaturation) / current;
			const height = start ? 0 : Math.log1p(relative) + logs[i]! - logSaturation;
			const predicted = start ? 0 : scale * height + current * resistance;
			return {
				jacobian: [
					start ? logs[i]! : height,
					start ? -1 : -scale / (1 + relative),
					current
				] as const,
				error: voltages[i]! - predicted
			};
		});
		const [a, b, c] = leastSquares(rows);
		if (start) {
			[scale, logSaturation, resistance] = [a, b / a, c];
		} else {
			scale += a;
			logSaturation += b;
			resistance += c;
			converged = Math.abs(a) < 1e-12 * scale && Math.abs(b) < 1e-10;
		}
		if (!(scale > 0)) throw new JunctionDataError('forward fit', 'a rising sweep', scale);
	}
	const model = {
		ideality: scale / vt,
		saturationCurrent: Math.exp(logSaturation),
		seriesResistance: resistance
	};
	const squares = currents.reduce(
		(sum, current, i) => sum + (voltages[i]! - forwardVoltage(model, current, temperature)) ** 2,
		0
	);
	return { model, residualRms: Math.sqrt(squares / currents.length), converged };
}

interface Row {
	readonly jacobian: readonly [number, number, number];
	readonly error: number;
}

/** Three unknowns by Gram–Schmidt on scaled columns: the currents span many decades. */
function leastSquares(rows: readonly Row[]): readonly [number, number, number] {
	const columns = [0, 1, 2].map((k) => rows.map(({ jacobian }) => jacobian[k]!));
	const dot = (a: readonly number[], b: readonly number[]) =>
		a.reduce((sum, value, i) => sum + value * b[i]!, 0);
	const basis: number[][] = [];
	const upper = [
		[0, 0, 0],
		[0, 0, 0],
		[0, 0, 0]
	];
	columns.forEach((column, k) => {
		let rest = column;
		for (let pass = 0; pass < 2; pass++)
			basis.forEach((direction, j) => {
				const share = dot(direction, rest);
				upper[j]![k]! += share;
				rest = rest.map((value, i) => value - share * direction[i]!);
			});
		const length = Math.sqrt(dot(rest, rest));
		upper[k]![k] = length;
		basis.push(rest.map((value) => value / length));
	});
	const projected = basis.map((direction) =>
		dot(
			direction,
			rows.map(({ error }) => error)
		)
	);
	const c = projected[2]! / upper[2]![2]!;
	const b = (projected[1]! - upper[1]![2]! * c) / upper[1]![1]!;
	const a = (projected[0]! - upper[0]![1]! * b - upper[0]![2]! * c) / upper[0]![0]!;
	return [a, b, c];
}
