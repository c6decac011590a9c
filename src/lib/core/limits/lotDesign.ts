import type { Distribution } from '../distributions/summary';
import { wafersByLot } from '../distributions/wafersByLot';
import { nestedStrata, oneWayStrata, type LotStrata } from '../stats/lotStrata';
import { poolGroups } from '../stats/varianceComponents';

/** How the devices of a distribution came: lots, their wafers, how many of each. */
export interface LotDesign {
	readonly strata: LotStrata;
	/** Lots with several wafers: wafers are a level of their own. */
	readonly isNested: boolean;
	readonly isBalanced: boolean;
	/** `25 devices`, or `22 to 25 devices`. */
	readonly sizes: string;
}

/**
 * The random-effects design behind a distribution, by wafer lots. Wafers are a level of their own
 * as soon as one lot has two of them; a lot split for assembly keeps its wafers together.
 *
 * @returns `undefined` when no lot has two devices, so that nothing shows the spread inside a lot
 */
export function lotDesign(distribution: Pick<Distribution, 'groups'>): LotDesign | undefined {
	const lots = wafersByLot(distribution.groups);
	const devices = lots.map((wafers) => wafers.reduce((sum, wafer) => sum + wafer.sampleSize, 0));
	const wafers = lots.flat();
	const total = devices.reduce((sum, count) => sum + count, 0);
	if (lots.length < 2 || total <= lots.length) return undefined;

	const isNested = wafers.length > lots.length && total > wafers.length;
	const isBalanced =
		areAlike(devices) &&
		(!isNested ||
			(areAlike(lots.map((lot) => lot.length)) &&
				areAlike(wafers.map(({ sampleSize }) => sampleSize))));
	return {
		strata: isNested ? nestedStrata(lots) : oneWayStrata(lots.map(poolGroups)),
		isNested,
		isBalanced,
		sizes: `${rangeText(devices)} devices`
	};
}

function areAlike(numbers: readonly number[]): boolean {
	return numbers.every((number) => number === numbers[0]);
}

function rangeText(counts: readonly number[]): string {
	const [lowest, highest] = [Math.min(...counts), Math.max(...counts)];
	return lowest === highest ? String(lowest) : `${lowest} to ${highest}`;
}
