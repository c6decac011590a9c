import { describeCondition } from '../characteristics/describeCondition';
import { measurementMessages } from '../messages/measurements';
import { devicesByLot } from './devicesByLot';
import { measuredKey } from './measuredKey';
import type { DeviceReading, ReadingSeries } from './readingTable';
import { robustSpread } from './robustSpread';
import { FEWEST_IN_LOT, OUTLYING } from './suspects';
import type { Suspect } from './suspects';

/**
 * With more than a quarter of a lot at a bound, the median absolute deviation is no longer that of
 * the values: up to there a bound lies outside the middle half, where its size doesn't matter.
 */
const MOST_CENSORED = 0.25;

/** Suspects of one series, and the lots in which none could be looked for. */
export interface JudgedSeries {
	readonly suspects: readonly Suspect[];
	readonly lotsNotJudged: readonly string[];
}

/**
 * Readings that don't look like their lot: |z| > 6 for z = (y − median) / scale within lot, where y
 * is the transformed value and scale the larger of 1.4826·MAD and one step of the resolution. A
 * bound is suspect only on the side it is a bound to: what is at most 0.1 may well be like a lot
 * that lies lower.
 *
 * @param lots lot of each device
 */
export function findReadingSuspects(series: ReadingSeries, lots: readonly string[]): JudgedSeries {
	const suspects: Suspect[] = [];
	const lotsNotJudged: string[] = [];
	for (const [lot, members] of devicesByLot(lots)) {
		const present = members
			.map((device) => ({ device, ...series.of(device) }))
			.filter(({ value }) => !Number.isNaN(value));
		const bounds = present.filter(({ censored }) => censored !== 0).length;
		if (present.length === 0) continue;
		if (present.length < FEWEST_IN_LOT || bounds > MOST_CENSORED * present.length) {
			lotsNotJudged.push(lot);
			continue;
		}
		for (const { device, z } of outliers(series, present)) {
			suspects.push({
				device,
				conditionKey: measuredKey({ of: series.characteristic.key, conditionKey: series.key }),
				reason: { rule: 'outlier', robustZ: z, text: reasonText(series, z, lot) }
			});
		}
	}
	return {
		suspects: suspects.sort((a, b) => a.device - b.device),
		lotsNotJudged: lotsNotJudged.sort()
	};
}

function outliers(
	{ characteristic: { transform }, decimals }: ReadingSeries,
	present: readonly (DeviceReading & { readonly device: number })[]
): { device: number; z: number }[] {
	const isIdentity = transform === 'identity';
	const values = Float64Array.from(present, ({ value }) => (isIdentity ? value : Math.log(value)));
	const { median, scale } = robustSpread(values);
	const step = Number(`1e${-decimals}`);
	const resolution = isIdentity ? step : step / Math.exp(median);
	return present.flatMap(({ device, censored }, index) => {
		const z = ((values[index] ?? median) - median) / Math.max(scale, resolution);
		// The millionth keeps a reading just six steps away from counting by a rounding error.
		const isOutlying = Math.abs(z) > OUTLYING * (1 + 1e-6);
		return isOutlying && z * censored >= 0 ? [{ device, z }] : [];
	});
}

function reasonText({ characteristic, condition }: ReadingSeries, z: number, lot: string): string {
	const { key, transform } = characteristic;
	return measurementMessages.readingOutlier({
		what: transform === 'identity' ? key : `ln ${key}`,
		z,
		lot,
		at: describeCondition(condition)
	});
}
