import type { CapacitanceModel } from './capacitanceModel';
import {
	CONVERGED,
	FLAGS,
	GRADING_EXPONENT_BOUNDS,
	IDENTIFIABLE,
	JUNCTION_POTENTIAL_BOUNDS,
	PARAMETERS,
	RESULT_WIDTH,
	RMS,
	type FixedParameters
} from './capacitanceFitResult';
import { JunctionDataError } from './errors';
import { invert, solve } from './smallMatrix';

const [C0, POTENTIAL, EXPONENT, CASE] = [0, 1, 2, 3] as const;

/** A pivot of the scaled normal matrix below this is nothing but rounding. */
const SINGULAR = 1e-13;
const ROUNDS = 200;

/** A step that gains less than this of the cost moves the parameters by 1e-4 of their errors. */
const NO_GAIN = 1e-8;
const NO_MOVE = 1e-9;

/** What a fitter knows of its last fit beyond the row it wrote. */
export interface FitDetail {
	/** Standard errors, NaN for a fixed parameter, one at its bound, or none to be had. */
	readonly standardErrors: Float64Array;
	readonly rounds: number;
}

/**
 * Fits C(V) = C_case + C_j0 (1 + V/V_j)^(−M) to many sweeps on one bias grid, by least squares in
 * relative error: Levenberg–Marquardt with the analytic Jacobian, steps kept inside the bounds, a
 * parameter that would be pushed through its bound left out of the step. All work space is
 * allocated once; a fit allocates nothing.
 *
 * Internally capacitance is in units of the first reading, and V_j enters as its logarithm.
 *
 * Source: Marquardt 1963; Moré 1978 (scaling by the diagonal).
 */
export class CapacitanceFitter {
	private readonly points: number;
	private readonly free: readonly number[];
	/** Biases and readings of the points present, and the model's parts at them. */
	private readonly bias: Float64Array;
	private readonly reading: Float64Array;
	private readonly shape: Float64Array;
	private readonly logarithm: Float64Array;
	private readonly residual: Float64Array;
	private readonly trialShape: Float64Array;
	private readonly trialLogarithm: Float64Array;
	private readonly trialResidual: Float64Array;
	private readonly normal = new Float64Array(16);
	private readonly damped = new Float64Array(16);
	private readonly gradient = new Float64Array(4);
	private readonly step = new Float64Array(4);
	private readonly current = new Float64Array(4);
	private readonly trial = new Float64Array(4);
	private readonly lower = new Float64Array(4);
	private readonly upper = new Float64Array(4);
	private readonly errors = new Float64Array(4);
	private readonly active = new Int32Array(4);
	private present = 0;
	private scale = 1;
	private rounds = 0;
	private lowestPotential: number;

	constructor(
		private readonly biases: ArrayLike<number>,
		private readonly fixed: FixedParameters = {}
	) {
		this.points = biases.length;
		this.bias = new Float64Array(this.points);
		this.reading = new Float64Array(this.points);
		this.shape = new Float64Array(this.points);
		this.logarithm = new Float64Array(this.points);
		this.residual = new Float64Array(this.points);
		this.trialShape = new Float64Array(this.points);
		this.trialLogarithm = new Float64Array(this.points);
		this.trialResidual = new Float64Array(this.points);
		this.free = PARAMETERS.flatMap((name, i) =>
			name !== 'zeroBiasCapacitance' && fixed[name] !== undefined ? [] : [i]
		);
		let deepest = 0;
		for (let i = 0; i < this.points; i++) deepest = Math.min(deepest, biases[i]!);
		/** A forward bias must stay below the junction potential. */
		this.lowestPotential = Math.max(JUNCTION_POTENTIAL_BOUNDS[0], -deepest * 1.02);
	}

	/**
	 * Fits the sweep at an offset of a packed matrix and writes one row of the result. NaN readings
	 * are left out.
	 *
	 * @param start - where to begin; the same for all sweeps of a set, so that order does not matter
	 * @throws {JunctionDataError} for fewer readings than free parameters, or one not above zero
	 */
	fit(
		readings: ArrayLike<number>,
		offset: number,
		start: CapacitanceModel,
		result: Float64Array,
		row: number
	): FitDetail {
		this.load(readings, offset);
		this.begin(start);
		let cost = this.evaluate(this.current, this.shape, this.logarithm, this.residual);
		let damping = 1e-5;
		let converged = false;
		for (this.rounds = 1; this.rounds <= ROUNDS && !converged; this.rounds++) {
			this.linearize();
			const size = this.chooseActive();
			if (size === 0) {
				converged = true;
				break;
			}
			for (;;) {
				this.takeStep(size, damping);
				const trialCost = this.evaluate(
					this.trial,
					this.trialShape,
					this.trialLogarithm,
					this.trialResidual
				);
				const moved = this.moved();
				if (trialCost <= cost) {
					converged = moved < NO_MOVE || cost - trialCost <= NO_GAIN * cost;
					cost = trialCost;
					this.accept();
					damping = Math.max(1e-12, damping / 20);
					break;
				}
				if (moved < 1e-11 || damping > 1e12) {
					converged = true;
					break;
				}
				damping *= 8;
			}
		}
		this.report(cost, converged, result, row);
		return { standardErrors: this.errors, rounds: this.rounds };
	}

	/** The points present, in units of the largest reading, and the bounds they set. */
	private load(readings: ArrayLike<number>, offset: number): void {
		let present = 0;
		let smallest = Infinity;
		let largest = 0;
		for (let i = 0; i < this.points; i++) {
			const value = readings[offset + i]!;
			if (Number.isNaN(value)) continue;
			if (!(value > 0 && value < Infinity))
				throw new JunctionDataError('capacitance fit', 'positive capacitances', value);
			this.bias[present] = this.biases[i]!;
			this.reading[present] = value;
			smallest = Math.min(smallest, value);
			largest = Math.max(largest, value);
			present++;
		}
		if (present < this.free.length)
			throw new JunctionDataError(
				'capacitance fit',
				`at least ${this.free.length} readings`,
				present
			);
		this.present = present;
		this.scale = largest;
		for (let i = 0; i < present; i++) this.reading[i]! /= largest;
		this.lower[C0] = 1e-12;
		this.upper[C0] = 1e6;
		this.lower[POTENTIAL] = Math.log(this.lowestPotential);
		this.upper[POTENTIAL] = Math.log(JUNCTION_POTENTIAL_BOUNDS[1]);
		this.lower[EXPONENT] = GRADING_EXPONENT_BOUNDS[0];
		this.upper[EXPONENT] = GRADING_EXPONENT_BOUNDS[1];
		this.lower[CASE] = 0;
		this.upper[CASE] = (smallest / largest) * (1 - 1e-9);
	}

	/** The start inside the bounds, fixed parameters as given. */
	private begin(start: CapacitanceModel): void {
		const { junctionPotential, gradingExponent, caseCapacitance } = { ...start, ...this.fixed };
		this.current[C0] = start.zeroBiasCapacitance / this.scale;
		this.current[POTENTIAL] = Math.log(junctionPotential);
		this.current[EXPONENT] = gradingExponent;
		this.current[CASE] = caseCapacitance / this.scale;
		for (const i of this.free) this.current[i] = this.inside(i, this.current[i]!);
	}

	private inside(parameter: number, value: number): number {
		return Math.min(this.upper[parameter]!, Math.max(this.lower[parameter]!, value));
	}

	/** Sum of squared relative errors; keeps the parts from which the Jacobian is made. */
	private evaluate(
		parameters: Float64Array,
		shape: Float64Array,
		logarithm: Float64Array,
		residual: Float64Array
	): number {
		const inverse = Math.exp(-parameters[POTENTIAL]!);
		const amplitude = parameters[C0]!;
		const exponent = parameters[EXPONENT]!;
		const base = parameters[CASE]!;
		let cost = 0;
		for (let i = 0; i < this.present; i++) {
			const log = Math.log(1 + this.bias[i]! * inverse);
			const power = Math.exp(-exponent * log);
			const error = (base + amplitude * power) / this.reading[i]! - 1;
			logarithm[i] = log;
			shape[i] = power;
			residual[i] = error;
			cost += error * error;
		}
		return cost;
	}

	/** JᵀJ and Jᵀr at the current point, from the parts kept by `evaluate`. */
	private linearize(): void {
		const inverse = Math.exp(-this.current[POTENTIAL]!);
		const amplitude = this.current[C0]!;
		const slope = amplitude * this.current[EXPONENT]!;
		let [n00, n01, n02, n03, n11, n12, n13, n22, n23, n33] = [0, 0, 0, 0, 0, 0, 0, 0, 0, 0];
		let [g0, g1, g2, g3] = [0, 0, 0, 0];
		for (let i = 0; i < this.present; i++) {
			const weight = 1 / this.reading[i]!;
			const relative = this.shape[i]! * weight;
			const x = this.bias[i]! * inverse;
			const j1 = (slope * relative * x) / (1 + x);
			const j2 = -amplitude * relative * this.logarithm[i]!;
			const r = this.residual[i]!;
			n00 += relative * relative;
			n01 += relative * j1;
			n02 += relative * j2;
			n03 += relative * weight;
			n11 += j1 * j1;
			n12 += j1 * j2;
			n13 += j1 * weight;
			n22 += j2 * j2;
			n23 += j2 * weight;
			n33 += weight * weight;
			g0 += relative * r;
			g1 += j1 * r;
			g2 += j2 * r;
			g3 += weight * r;
		}
		const n = this.normal;
		n[0] = n00;
		n[1] = n[4] = n01;
		n[2] = n[8] = n02;
		n[3] = n[12] = n03;
		n[5] = n11;
		n[6] = n[9] = n12;
		n[7] = n[13] = n13;
		n[10] = n22;
		n[11] = n[14] = n23;
		n[15] = n33;
		this.gradient[0] = g0;
		this.gradient[1] = g1;
		this.gradient[2] = g2;
		this.gradient[3] = g3;
	}

	/** Free parameters that are not held at a bound by the gradient. */
	private chooseActive(): number {
		let size = 0;
		for (const i of this.free) {
			const gradient = this.gradient[i]!;
			const atLower = this.current[i]! <= this.lower[i]! && gradient > 0;
			const atUpper = this.current[i]! >= this.upper[i]! && gradient < 0;
			if (!atLower && !atUpper) this.active[size++] = i;
		}
		return size;
	}

	/** Solves the damped normal equations of the active parameters and moves the trial there. */
	private takeStep(size: number, damping: number): void {
		for (let a = 0; a < size; a++) {
			const i = this.active[a]!;
			for (let b = 0; b < size; b++) this.damped[a * 4 + b] = this.normal[i * 4 + this.active[b]!]!;
			this.damped[a * 4 + a]! *= 1 + damping;
			this.step[a] = -this.gradient[i]!;
		}
		solve(this.damped, this.step, size);
		this.trial.set(this.current);
		for (let a = 0; a < size; a++) {
			const i = this.active[a]!;
			this.trial[i] = this.inside(i, this.current[i]! + this.step[a]!);
		}
	}

	private moved(): number {
		let most = 0;
		for (let i = 0; i < 4; i++) {
			const size = i === POTENTIAL ? 1 : Math.abs(this.current[i]!) + 1e-6;
			most = Math.max(most, Math.abs(this.trial[i]! - this.current[i]!) / size);
		}
		return most;
	}

	private accept(): void {
		this.current.set(this.trial);
		this.shape.set(this.trialShape);
		this.logarithm.set(this.trialLogarithm);
		this.residual.set(this.trialResidual);
	}

	private report(cost: number, converged: boolean, result: Float64Array, row: number): void {
		this.linearize();
		let hit = 0;
		let size = 0;
		for (const i of this.free) {
			const value = this.current[i]!;
			if (value <= this.lower[i]! || value >= this.upper[i]!) hit |= 1 << i;
			else this.active[size++] = i;
		}
		const identifiable = this.computeErrors(size, cost);
		const at = row * RESULT_WIDTH;
		result[at + C0] = this.current[C0]! * this.scale;
		result[at + POTENTIAL] = Math.exp(this.current[POTENTIAL]!);
		result[at + EXPONENT] = this.current[EXPONENT]!;
		result[at + CASE] = this.current[CASE]! * this.scale;
		result[at + RMS] = Math.sqrt(cost / this.present);
		result[at + FLAGS] = hit | (converged ? CONVERGED : 0) | (identifiable ? IDENTIFIABLE : 0);
	}

	/**
	 * Standard errors from the inverse normal matrix. False when that is singular to working
	 * precision, or when V_j or M is not known to its own size: the readings don't tell them apart.
	 */
	private computeErrors(size: number, cost: number): boolean {
		this.errors.fill(NaN);
		const scaled = this.damped;
		for (let a = 0; a < size; a++)
			for (let b = 0; b < size; b++) {
				const [i, j] = [this.active[a]!, this.active[b]!];
				const diagonal = this.normal[i * 5]! * this.normal[j * 5]!;
				scaled[a * 4 + b] = diagonal > 0 ? this.normal[i * 4 + j]! / Math.sqrt(diagonal) : 0;
			}
		if (!invert(scaled, size, SINGULAR)) return false;
		const degrees = this.present - size;
		if (degrees < 1) return true;
		for (let a = 0; a < size; a++) {
			const i = this.active[a]!;
			const error = Math.sqrt(((cost / degrees) * scaled[a * 5]!) / this.normal[i * 5]!);
			if (i === POTENTIAL) this.errors[i] = error * Math.exp(this.current[POTENTIAL]!);
			else this.errors[i] = i === EXPONENT ? error : error * this.scale;
		}
		const isKnown = (i: number, value: number) => !(this.errors[i]! > value);
		return (
			isKnown(POTENTIAL, Math.exp(this.current[POTENTIAL]!)) &&
			isKnown(EXPONENT, this.current[EXPONENT]!)
		);
	}
}
