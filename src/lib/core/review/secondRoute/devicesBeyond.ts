import type { DeviceOutside, LotRange, OutsideCount } from '../verificationEvidence';
import type { Basis } from '../../limits/basis';
import { binomialQuantile } from './binomialQuantile';
import type { DeviceValue } from './readColumn';

/** A file's 12.50 pF read into farad isn't the binary 12.50e-12 of the limit: noise of the arithmetic. */
const NOISE = 1e-12;
const LISTED = 100;
const LISTED_PER_LOT = 12;

/** The printed limits in SI; `null` where none is printed. */
export interface PrintedLimits {
	readonly minimum: number | null;
	readonly maximum: number | null;
}

/** What a limit promises, as far as the number of devices beyond it goes. */
export interface OutsidePromise {
	/** Share of normal values that a limit of this content and confidence leaves outside. */
	readonly share: number;
	/** γ */
	readonly confidence: number;
}

/**
 * How many devices the basis allows beyond one limit. None behind *tested on every device*; else as
 * many as a sample with that share outside stays within with probability γ: the γ quantile of the
 * binomial distribution (limits.md §6). `null` for a typical value, which promises nothing.
 */
export function allowedOutside(
	basis: Basis,
	devices: number,
	{ share, confidence }: OutsidePromise
): number | null {
	switch (basis) {
		case 'tested':
			return 0;
		case 'sample-tested':
		case 'correlation':
		case 'characterized':
			return binomialQuantile(confidence, devices, share);
		case 'typical':
			return null;
		default:
			return basis satisfies never;
	}
}

/** Counts what lies beyond a limit and sets it against what the basis allows. */
export function countOutside(
	devices: readonly DeviceValue[],
	side: 'minimum' | 'maximum',
	limits: PrintedLimits,
	{ allowed, share }: { readonly allowed: number | null; readonly share: number }
): OutsideCount | null {
	if (allowed === null || limits[side] === null) return null;
	return {
		count: devices.filter(({ value }) => sideBeyond(value, limits) === side).length,
		allowed,
		expected: share * devices.length
	};
}

/** The devices beyond the printed limits, furthest out first. */
export function listOutside(
	devices: readonly DeviceValue[],
	limits: PrintedLimits,
	unitScale: number
): DeviceOutside[] {
	return devices
		.flatMap(({ lot, wafer, device, value }): DeviceOutside[] => {
			const side = sideBeyond(value, limits);
			const limit = side === undefined ? null : limits[side];
			if (side === undefined || limit === null) return [];
			const beyondPercent = ((value - limit) / limit) * 100;
			return [{ lot, wafer, device, side, value: value / unitScale, beyondPercent }];
		})
		.toSorted((a, b) => Math.abs(b.beyondPercent) - Math.abs(a.beyondPercent))
		.slice(0, LISTED);
}

function sideBeyond(value: number, { minimum, maximum }: PrintedLimits) {
	if (minimum !== null && value < minimum * (1 - NOISE)) return 'minimum' as const;
	if (maximum !== null && value > maximum * (1 + NOISE)) return 'maximum' as const;
	return undefined;
}

/** Range, quartiles and what lies beyond, lot by lot in the order of their names. */
export function lotRanges(
	devices: readonly DeviceValue[],
	limits: PrintedLimits,
	unitScale: number
): LotRange[] {
	const lots = [...new Set(devices.map(({ lot }) => lot))].toSorted();
	return lots.map((name) => {
		const members = devices.filter(({ lot }) => lot === name);
		const sorted = members.map(({ value }) => value / unitScale).toSorted((a, b) => a - b);
		const at = (share: number) => sorted[Math.round(share * (sorted.length - 1))] ?? NaN;
		return {
			lot: name,
			devices: sorted.length,
			lowest: at(0),
			lowerQuartile: at(0.25),
			median: at(0.5),
			upperQuartile: at(0.75),
			highest: at(1),
			outside: members
				.filter(({ value }) => sideBeyond(value, limits) !== undefined)
				.slice(0, LISTED_PER_LOT)
				.map(({ value }) => value / unitScale)
		};
	});
}
