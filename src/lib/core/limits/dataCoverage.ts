import { requiredSampleSize } from '../stats/orderStatistics';
import { promiseOf } from './methods/promise';
import type { LimitPolicy } from './policy';

/** How many devices of an independent lot were measured at one condition, bias included. */
export interface CoverageCount {
	readonly characteristic: string;
	/** What was measured together: the condition without a reverse bias where that is swept. */
	readonly series: string;
	readonly sampleSize: number;
	readonly lots: readonly { readonly name: string; readonly devices: number }[];
}

/** A lot in a series: at how many conditions it was measured, and the devices at most of them. */
export interface CoverageCell {
	readonly lot: string;
	readonly devices: number;
	readonly conditions: number;
}

/** Everything measured of a characteristic at one temperature: one row of the table. */
export interface CoverageSeries {
	readonly characteristic: string;
	readonly series: string;
	/** Biases of a sweep; 1 for a single reading. */
	readonly conditions: number;
	/** Devices and lots where fewest were measured: what a limit there rests on. */
	readonly fewestDevices: number;
	readonly fewestLots: number;
	/** One for each lot of the product, in their order. */
	readonly cells: readonly CoverageCell[];
}

export interface DataCoverage {
	readonly lots: readonly string[];
	readonly series: readonly CoverageSeries[];
}

/** Counts by series and lot, in the order the series come; a lot that is missing has 0 devices. */
export function dataCoverage(counts: readonly CoverageCount[]): DataCoverage {
	const lots = [...new Set(counts.flatMap((of) => of.lots.map(({ name }) => name)))].sort((a, b) =>
		a < b ? -1 : 1
	);
	const bySeries = new Map<string, CoverageCount[]>();
	for (const count of counts) {
		const key = `${count.characteristic} ${count.series}`;
		bySeries.set(key, [...(bySeries.get(key) ?? []), count]);
	}
	return { lots, series: [...bySeries.values()].map((of) => seriesOf(of, lots)) };
}

function seriesOf(counts: readonly CoverageCount[], lots: readonly string[]): CoverageSeries {
	const { characteristic = '', series = '' } = counts[0] ?? {};
	return {
		characteristic,
		series,
		conditions: counts.length,
		fewestDevices: Math.min(...counts.map(({ sampleSize }) => sampleSize)),
		fewestLots: Math.min(...counts.map((of) => of.lots.length)),
		cells: lots.map((lot) => {
			const devices = counts.map((of) => of.lots.find(({ name }) => name === lot)?.devices ?? 0);
			return {
				lot,
				devices: Math.max(...devices),
				conditions: devices.filter((count) => count > 0).length
			};
		})
	};
}

/** What a policy asks of the data, and what a series lacks of it. */
export interface PolicyNeed {
	readonly lots: number;
	readonly devices: number;
	readonly moreLots: number;
	readonly moreDevices: number;
}

/**
 * What a policy would need more of, with a minimum and a maximum promised at once: its own gates,
 * and for `order` the devices its exact confidence takes (the extremes as limits).
 */
export function policyNeed(
	rules: LimitPolicy,
	{ fewestDevices, fewestLots }: Pick<CoverageSeries, 'fewestDevices' | 'fewestLots'>
): PolicyNeed {
	const devices = Math.max(rules.minimumDevices, devicesOfOrder(rules));
	return {
		lots: rules.minimumLots,
		devices,
		moreLots: Math.max(0, rules.minimumLots - fewestLots),
		moreDevices: Math.max(0, devices - fewestDevices)
	};
}

function devicesOfOrder(rules: LimitPolicy): number {
	if (rules.method !== 'order') return 0;
	const promise = promiseOf(rules, ['minimum', 'maximum']);
	return requiredSampleSize(promise, promise.isBetween ? 2 : 1);
}
