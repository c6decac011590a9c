import { writeFileSync } from 'node:fs';
import { join } from 'node:path';

const DEVICES = 10_000;
const ROWS_PER_BLOCK = 2048;
const TEMPERATURES = [-40, 25, 125];
const BIASES = Array.from({ length: 33 }, (_, i) => (i * 30) / 32);
const [LOTS, WAFERS] = [5, 4];

/** Uniform numbers from a 32-bit state: Marsaglia's xorshift. */
function uniform(seed) {
	let state = seed;
	return () => {
		state ^= state << 13;
		state ^= state >>> 17;
		state ^= state << 5;
		return (state >>> 0) / 4294967296;
	};
}

/** Sum of twelve uniforms less six: near enough to normal for a benchmark. */
const normalFrom = (random) => () => {
	let sum = -6;
	for (let i = 0; i < 12; i++) sum += random();
	return sum;
};

/**
 * Writes what both sides read: the matrices of 10,000 devices as packed blocks (float64, little
 * endian, row by row) at three temperatures, and the plan that says who the rows are.
 */
export function writePackedBlocks(folder) {
	const normal = normalFrom(uniform(20_261_201));
	const lots = Array.from({ length: LOTS }, normal);
	const wafers = Array.from({ length: LOTS * WAFERS }, normal);
	const perWafer = DEVICES / (LOTS * WAFERS);
	const devices = Array.from({ length: DEVICES }, (_, i) => {
		const wafer = Math.floor(i / perWafer);
		const lot = Math.floor(wafer / WAFERS);
		return {
			lot: `L${lot + 1}`,
			wafer: `W${(wafer % WAFERS) + 1}`,
			name: `D${i + 1}`,
			zeroBias: 40e-12 * Math.exp(0.008 * lots[lot] + 0.006 * wafers[wafer] + 0.01 * normal()),
			potential: 0.75 * (1 + 0.01 * normal()),
			exponent: 0.47 * (1 + 0.005 * normal()),
			package: 0.6e-12 * (1 + 0.02 * normal())
		};
	});
	const blocks = Math.ceil(DEVICES / ROWS_PER_BLOCK);
	const chunks = Array.from({ length: blocks }, (_, block) =>
		devices.slice(block * ROWS_PER_BLOCK, (block + 1) * ROWS_PER_BLOCK)
	);
	for (const temperature of TEMPERATURES)
		for (const [block, rows] of chunks.entries()) {
			const values = new Float64Array(rows.length * BIASES.length);
			for (const [r, device] of rows.entries())
				for (const [b, bias] of BIASES.entries()) {
					const potential = device.potential - 0.0015 * (temperature - 25);
					const law = device.zeroBias * (1 + bias / potential) ** -device.exponent;
					values[r * BIASES.length + b] = (law + device.package) * (1 + 0.0003 * normal());
				}
			writeFileSync(join(folder, `${temperature}-${block}.bin`), new Uint8Array(values.buffer));
		}
	const names = (rows) => ({
		lot: rows.map(({ lot }) => lot),
		wafer: rows.map(({ wafer }) => wafer),
		site: rows.map(() => ''),
		element: rows.map(() => ''),
		name: rows.map(({ name }) => name)
	});
	writeFileSync(
		join(folder, 'plan.json'),
		JSON.stringify({
			biases: BIASES,
			temperatures: TEMPERATURES,
			rowsPerBlock: ROWS_PER_BLOCK,
			blocks,
			devices: chunks.map(names)
		})
	);
}
