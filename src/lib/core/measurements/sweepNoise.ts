import { devicesByLot } from './devicesByLot';
import { medianOf, robustSpread } from './robustSpread';
import type { SweepMeans } from './sweepMeans';

/**
 * The repeatability that the sweeps themselves show where nothing was read twice. Each device's
 * ln C is compared with its lot's median; what differs smoothly along the bias is the device, what
 * jumps from bias to bias is noise. The second difference of independent noise of spread s has the
 * spread √6·s. 0 when sweeps have fewer than three biases.
 */
export function sweepNoise(means: SweepMeans, lots: readonly string[]): number {
	const width = means.biases.length;
	if (width < 3) return 0;
	const medians = lotMedians(means, lots);
	const seconds: number[] = [];
	for (let device = 0; device < means.deviceCount; device++) {
		const median = medians.get(lots[device] ?? '');
		if (median === undefined) continue;
		const rest = (position: number) => means.ln(device, position) - (median[position] ?? 0);
		for (let position = 1; position < width - 1; position++) {
			const second = rest(position - 1) - 2 * rest(position) + rest(position + 1);
			if (!Number.isNaN(second)) seconds.push(second);
		}
	}
	return seconds.length === 0 ? 0 : robustSpread(Float64Array.from(seconds)).scale / Math.sqrt(6);
}

function lotMedians(means: SweepMeans, lots: readonly string[]): Map<string, Float64Array> {
	return new Map(
		[...devicesByLot(lots)].map(([lot, devices]) => [
			lot,
			Float64Array.from(means.biases, (_, position) =>
				medianOf(
					Float64Array.from(devices, (device) => means.ln(device, position)).filter(
						(value) => !Number.isNaN(value)
					)
				)
			)
		])
	);
}
