/* Three wafer lots of 100 devices each, measured at four biases: enough for every default policy. */

export const BIASES = [0, 1, 4, 10];
export const LOTS = ['LK26-011', 'LK26-014', 'LK26-019'];
const PER_LOT = 100;
export const FREQUENCY = 1e6;
/** The sweeps at 25 °C. */
export const SWEEP_KEY = 'T=25;f=1000000';

/** A linear congruential generator: the same spread in every run. */
function* pseudoRandom(seed: number): Generator<number> {
	for (let state = seed; ;) {
		state = (state * 1_103_515_245 + 12_345) % 2 ** 31;
		yield state / 2 ** 31;
	}
}

export const devices = LOTS.flatMap((lot) =>
	Array.from({ length: PER_LOT }, (_, i) => ({
		lot,
		wafer: `0${1 + Math.floor(i / 25)}`,
		name: String(i + 1)
	}))
);

/** Capacitances in pF with three decimals, as a tester writes them; device by device. */
export function sweeps(seed: number): Float64Array {
	const random = pseudoRandom(seed);
	const uniform = () => Number(random.next().value);
	return Float64Array.from(
		devices.flatMap(({ lot }) => {
			const spread = 0.03 * (uniform() + uniform() + uniform() - 1.5) + LOTS.indexOf(lot) * 0.004;
			return BIASES.map((bias) =>
				Number((40 * (1 + bias / 2) ** -1.1 * Math.exp(spread * (1 + bias / 50))).toFixed(3))
			);
		})
	);
}

/** The capacitances at one bias, device by device. */
export const columnOf = (values: Float64Array, bias: number) =>
	[...values].filter((_, i) => i % BIASES.length === BIASES.indexOf(bias));
