import { normalBetween } from '$lib/core/stats/normalDistribution';
import { normalQuantile } from '$lib/core/stats/normalQuantile';
import { largestDiscard, ranksBetween } from '$lib/core/stats/orderStatistics';
import { LOT_COUNTS, LOT_SHARES } from './design';
import { drawsFrom } from './draws';
import { PROMISE, SHARED_CONFIDENCE, type Study } from './study';

const { content } = PROMISE;
const Z = normalQuantile(content);

/** Enough for all three promises: 299 for one limit, 368 for each of two, 473 for both together. */
const DEVICES = 480;

/** The device of this rank from below, and the one of the same rank from above. */
function extremes(values: Float64Array, minimum: number, maximum: number) {
	const sorted = values.sort();
	return [sorted[minimum - 1]!, sorted[maximum - 1]!] as const;
}

function study(lots: number, lotShare: number): Study {
	const single = largestDiscard(DEVICES, PROMISE);
	const shared = largestDiscard(DEVICES, { content, confidence: SHARED_CONFIDENCE });
	const between = ranksBetween(DEVICES, PROMISE) ?? { minimum: 1, maximum: DEVICES };
	const [ofLots, ofDevices] = [Math.sqrt(lotShare), Math.sqrt(1 - lotShare)];
	return {
		method: 'order',
		promises: ['one limit', 'each', 'between'],
		shape: `lots, ${DEVICES} devices in all`,
		lotSizes: Array.from({ length: lots }, () => DEVICES / lots),
		lotShare,
		simulate: (random) => {
			const { normal } = drawsFrom(random);
			const values = new Float64Array(DEVICES);
			return () => {
				let below = 0;
				let above = 0;
				for (let lot = 0, d = 0; lot < lots; lot++) {
					const ofLot = ofLots * normal();
					for (; d < ((lot + 1) * DEVICES) / lots; d++) {
						const value = ofLot + ofDevices * normal();
						values[d] = value;
						if (value <= -Z) below++;
						if (value >= Z) above++;
					}
				}
				const [minimum, maximum] = extremes(values, between.minimum, between.maximum);
				return [
					below >= single,
					below >= shared && above >= shared,
					normalBetween(minimum, maximum) >= content
				];
			};
		}
	};
}

/** Order statistics of all lots pooled. The r-th device keeps the content when r lie beyond it. */
export const ORDER_STUDIES: readonly Study[] = LOT_SHARES.flatMap((share) =>
	LOT_COUNTS.map((lots) => study(lots, share))
);
