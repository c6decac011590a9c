import type { SweepMatrix } from './conditionColumns';
import { InterpolationError } from './errors';

/**
 * Capacitances at biases nobody measured, each from its own sweep: linear in ln C against
 * ln(V_R + V_j) between the two readings of that sweep that enclose the bias. For a power law
 * C ∝ (1 + V_R/V_j)^(−M) that is exact, and near one the error falls with the square of the step.
 * A bias beyond a sweep's own readings gets no value from it: nothing is extrapolated.
 *
 * Repeated readings at one bias are averaged first. Values have the errors of two readings averaged,
 * so that they scatter a little less than readings would.
 *
 * @param biases in V, ascending
 * @param junctionPotential V_j in V; see {@link straighteningPotential}
 * @throws {InterpolationError} when V_R + V_j is not above zero over the whole grid
 */
export function interpolateSweeps(
	matrix: SweepMatrix,
	biases: readonly number[],
	junctionPotential: number
): SweepMatrix {
	const { grid, values } = matrix;
	const lowest = Math.min(...grid);
	if (!(lowest + junctionPotential > 0)) throw new InterpolationError(junctionPotential, lowest);

	const order = [...grid.keys()].sort((a, b) => grid[a]! - grid[b]!);
	const sweep = new Sweep(grid.length);
	const targets = biases.map((bias) => ({ bias, x: Math.log(bias + junctionPotential) }));
	const rows = values.length / grid.length;
	const found = new Float64Array(rows * biases.length);
	for (let row = 0; row < rows; row++) {
		sweep.clear();
		for (const position of order) {
			sweep.add(grid[position]!, values[row * grid.length + position]!);
		}
		sweep.straighten(junctionPotential);
		for (const [t, { bias, x }] of targets.entries()) {
			found[row * biases.length + t] = sweep.at(bias, x);
		}
	}
	return { ...matrix, grid: [...biases], values: found };
}

/** The readings of one sweep from the lowest bias up; its space is used again for the next. */
class Sweep {
	readonly #bias: Float64Array;
	readonly #reading: Float64Array;
	readonly #x: Float64Array;
	readonly #y: Float64Array;
	#count = 0;
	#repeats = 0;
	#next = 1;

	constructor(points: number) {
		this.#bias = new Float64Array(points);
		this.#reading = new Float64Array(points);
		this.#x = new Float64Array(points);
		this.#y = new Float64Array(points);
	}

	clear(): void {
		this.#count = 0;
		this.#next = 1;
	}

	/** Biases come ascending; NaN is no reading; a bias that comes again is averaged. */
	add(bias: number, reading: number): void {
		if (Number.isNaN(reading)) return;
		const last = this.#count - 1;
		if (last >= 0 && this.#bias[last] === bias) {
			this.#repeats += 1;
			this.#reading[last]! += (reading - this.#reading[last]!) / (this.#repeats + 1);
			return;
		}
		this.#repeats = 0;
		this.#bias[this.#count] = bias;
		this.#reading[this.#count] = reading;
		this.#count += 1;
	}

	straighten(junctionPotential: number): void {
		for (let i = 0; i < this.#count; i++) {
			this.#x[i] = Math.log(this.#bias[i]! + junctionPotential);
			this.#y[i] = Math.log(this.#reading[i]!);
		}
	}

	/** The value at a bias not below the one asked before; NaN beyond the readings. */
	at(bias: number, x: number): number {
		const last = this.#count - 1;
		if (last < 0 || bias < this.#bias[0]! || bias > this.#bias[last]!) return Number.NaN;
		while (this.#next < last && this.#bias[this.#next]! < bias) this.#next += 1;
		const right = Math.min(this.#next, last);
		if (this.#bias[right] === bias) return this.#reading[right]!;
		const left = right - 1;
		if (this.#bias[left] === bias) return this.#reading[left]!;
		const part = (x - this.#x[left]!) / (this.#x[right]! - this.#x[left]!);
		return Math.exp(this.#y[left]! + part * (this.#y[right]! - this.#y[left]!));
	}
}
