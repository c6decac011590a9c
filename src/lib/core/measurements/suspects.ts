import { z } from 'zod';
import { measurementMessages } from '../messages/measurements';
import { devicesByLot } from './devicesByLot';
import { CURRENT_SWEEP, measuredKey } from './measuredKey';
import { sweepMeans } from './sweepMeans';
import type { SweepMeans } from './sweepMeans';
import { robustSpread } from './robustSpread';
import { sweepNoise } from './sweepNoise';
import type { Repeatability } from './repeatability';
import type { ConditionSweeps } from './sweepTable';

/** Why a sweep waits in quarantine. */
export const suspectReason = z.object({
	rule: z.enum(['outlier', 'rises']),
	/** Where a sweep shows it most, in V. */
	bias: z.number().optional(),
	/** Within the lot: of ln C, ln |I| at that bias, or of the transformed reading. */
	robustZ: z.number().optional(),
	text: z.string()
});
export type SuspectReason = z.infer<typeof suspectReason>;

/** What a person must look at: a sweep or reading of a device at one condition. */
export interface Suspect {
	/** Index over the set. */
	readonly device: number;
	/** As `measuredKey` writes it. */
	readonly conditionKey: string;
	readonly reason: SuspectReason;
}

/** Robust standard deviations from the lot beyond which a reading is suspect. */
export const OUTLYING = 6;
/** A rise is suspect beyond so many times the repeatability (the step's own spread is √2 of it). */
const RISING = 6;
/** Fewer devices of a lot have no spread to judge by. */
export const FEWEST_IN_LOT = 5;
/** Repeated readings from which repeatability is known well enough. */
const ENOUGH_REPEATS = 10;

/**
 * Sweeps that don't look like their lot, or don't look like a junction.
 *
 * 1. *outlier*: |z| > 6 for z = (ln C − median) / scale within lot and bias, where scale is the
 *    larger of 1.4826·MAD and one step of the readings' resolution (with quantized readings MAD
 *    can be 0).
 * 2. *rises*: capacitance that rises with reverse bias by more than 6 times the repeatability and
 *    more than one step of the resolution. A current may rise.
 *
 * @param lots lot of each device
 */
export function findSuspects(
	condition: ConditionSweeps,
	lots: readonly string[],
	repeats: Repeatability | undefined
): Suspect[] {
	const means = sweepMeans(condition, lots.length);
	const isCurrent = condition.quantity === 'current';
	const found = isCurrent
		? outliers(means, lots, 'ln |I|')
		: [...outliers(means, lots, 'ln C'), ...rises(means, noiseOf(means, lots, repeats))];
	const conditionKey = isCurrent
		? measuredKey({ of: CURRENT_SWEEP, conditionKey: condition.key })
		: condition.key;
	return found
		.sort((a, b) => a.device - b.device)
		.map(({ device, reason }) => ({ device, conditionKey, reason }));
}

type Found = Omit<Suspect, 'conditionKey'>;

function noiseOf(
	means: SweepMeans,
	lots: readonly string[],
	repeats: Repeatability | undefined
): number {
	return repeats !== undefined && repeats.degreesOfFreedom >= ENOUGH_REPEATS
		? repeats.standardDeviation
		: sweepNoise(means, lots);
}

/** @param what is compared, as the sentence names it */
function outliers(means: SweepMeans, lots: readonly string[], what: string): Found[] {
	const worst = new Map<number, { z: number; bias: number; beyond: number }>();
	for (const members of devicesByLot(lots).values()) {
		for (const [position, bias] of means.biases.entries()) {
			const present = members.filter((device) => !Number.isNaN(means.ln(device, position)));
			if (present.length < FEWEST_IN_LOT) continue;
			const values = Float64Array.from(present, (device) => means.ln(device, position));
			const { median, scale } = robustSpread(values);
			const resolution = (means.steps[position] ?? 0) / Math.exp(median);
			for (const [index, device] of present.entries()) {
				const z = ((values[index] ?? median) - median) / Math.max(scale, resolution);
				if (!(Math.abs(z) > OUTLYING)) continue;
				const before = worst.get(device) ?? { z: 0, bias, beyond: 0 };
				const isWorse = Math.abs(z) > Math.abs(before.z);
				worst.set(device, {
					z: isWorse ? z : before.z,
					bias: isWorse ? bias : before.bias,
					beyond: before.beyond + 1
				});
			}
		}
	}
	return [...worst].map(([device, { z, bias, beyond }]) => ({
		device,
		reason: {
			rule: 'outlier',
			bias,
			robustZ: z,
			text: measurementMessages.outlier({
				what,
				z,
				bias,
				beyond,
				biases: means.biases.length,
				lot: lots[device] ?? ''
			})
		}
	}));
}

function rises(means: SweepMeans, noise: number): Found[] {
	const found: Found[] = [];
	for (let device = 0; device < means.deviceCount; device++) {
		let worst: { readonly from: number; readonly to: number; readonly rise: number } | undefined;
		let before = -1;
		for (const position of means.biases.keys()) {
			const here = means.ln(device, position);
			if (Number.isNaN(here)) continue;
			if (before >= 0) {
				const rise = here - means.ln(device, before);
				const step = (means.steps[position] ?? 0) / Math.exp(here);
				// The thousandth keeps a rise of just one step from counting by a rounding error.
				const isRise = rise > RISING * noise && rise > 1.001 * step;
				if (isRise && rise > (worst?.rise ?? 0)) worst = { from: before, to: position, rise };
			}
			before = position;
		}
		if (worst === undefined) continue;
		const [from = 0, to = 0] = [means.biases[worst.from], means.biases[worst.to]];
		found.push({
			device,
			reason: {
				rule: 'rises',
				bias: to,
				text: measurementMessages.rises(from, to, Math.expm1(worst.rise) * 100, worst.rise / noise)
			}
		});
	}
	return found;
}
