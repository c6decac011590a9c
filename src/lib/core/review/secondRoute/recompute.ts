import { EXTREMES } from '../../distributions/extremes';
import type { Allowance, Side } from '../../limits/allowance';
import type { LimitPolicy } from '../../limits/policy';
import { wholeCurveHasOneRoute } from '../../messages/verification';
import { lotsHalfWidth, lotsMargin } from './lotsMargin';
import { lotSpread } from './lotSpread';
import { normalProbability } from './normalProbability';
import { oneSidedFactor, type Assurance } from './oneSidedFactor';
import { orderRanks } from './orderRanks';
import type { DeviceValue } from './readColumn';
import { twoSidedFactor } from './twoSidedFactor';

export interface Recomputed {
	/** Before rounding, in SI. */
	readonly minimum: number;
	readonly typical: number;
	readonly maximum: number;
	/** Share of values such a limit leaves outside on one side. */
	readonly shareOutside: number;
}

export type Recomputation =
	| { readonly status: 'done'; readonly limits: Recomputed }
	| { readonly status: 'refused'; readonly reason: string };

export interface RecomputeOptions {
	/** Whether minimum and maximum are promised at once. */
	readonly isShared: boolean;
	/** Stated systematic uncertainty, relative, outwards on both sides. */
	readonly uncertainty: number;
}

/** What lies between the limits before allowances: minimum and maximum in SI. */
type Between = Pick<Recomputed, 'minimum' | 'maximum' | 'shareOutside'>;

/**
 * Minimum, median and maximum from the devices' values by the second route: two passes over the
 * logarithms for mean and spread, the factor by integrating the confidence, ranks by summing the
 * binomial distribution, the median by sorting.
 *
 * @param devices with values in SI, positive
 */
export function recompute(
	devices: readonly DeviceValue[],
	rules: LimitPolicy,
	{ isShared, uncertainty }: RecomputeOptions
): Recomputation {
	if (devices.length < 2)
		return { status: 'refused', reason: `only ${devices.length} measured devices` };
	if (rules.span === 'whole-curve') return { status: 'refused', reason: wholeCurveHasOneRoute() };
	const between = betweenOf(devices, rules, isShared);
	if (typeof between === 'string') return { status: 'refused', reason: between };

	const added = rules.uncertaintyTreatment === 'not-added' ? 0 : uncertainty;
	const outwards = (value: number, side: Side) => {
		const sign = side === 'minimum' ? -1 : 1;
		return moved(value, sign, driftOn(rules, side)) * (1 + sign * added);
	};
	return {
		status: 'done',
		limits: {
			minimum: outwards(between.minimum, 'minimum'),
			typical: median(devices.map(({ value }) => value)),
			maximum: outwards(between.maximum, 'maximum'),
			shareOutside: between.shareOutside
		}
	};
}

function driftOn({ drift }: LimitPolicy, side: Side): Allowance {
	return typeof drift === 'number' ? { relative: drift } : (drift[side] ?? { relative: 0 });
}

function moved(value: number, sign: number, by: Allowance): number {
	return 'relative' in by ? value * (1 + sign * by.relative) : value + sign * by.absolute;
}

/** The raw limits, or why this route has none. */
function betweenOf(
	devices: readonly DeviceValue[],
	rules: LimitPolicy,
	isShared: boolean
): Between | string {
	const isTogether = isShared && rules.tails === 'both';
	const assurance = {
		content: rules.content,
		confidence: isShared && !isTogether ? (1 + rules.confidence) / 2 : rules.confidence
	};
	switch (rules.method) {
		case 'normal':
			return pooled(
				devices,
				isTogether
					? twoSidedFactor(devices.length, assurance)
					: oneSidedFactor(devices.length, assurance)
			);
		case 'sigma':
			return rules.k === undefined
				? 'the policy states no multiple of the standard deviation'
				: pooled(devices, rules.k);
		case 'lots':
			return futureLots(devices, assurance, isTogether);
		case 'order':
			return ordered(devices, assurance, isTogether);
		default:
			return rules.method satisfies never;
	}
}

function pooled(devices: readonly DeviceValue[], factor: number): Between {
	const { mean, spread } = momentsOf(devices);
	return around(mean, factor * spread, factor);
}

function futureLots(
	devices: readonly DeviceValue[],
	assurance: Assurance,
	isTogether: boolean
): Between | string {
	const spread = lotSpread(devices.map((of) => ({ ...of, y: Math.log(of.value) })));
	if (spread === undefined) return 'lots of several devices are needed';
	const margin = isTogether ? lotsHalfWidth(spread, assurance) : lotsMargin(spread, assurance);
	return around(spread.mean, margin, margin / momentsOf(devices).spread);
}

function ordered(
	devices: readonly DeviceValue[],
	assurance: Assurance,
	isTogether: boolean
): Between | string {
	const ranks = orderRanks(devices.length, assurance, isTogether);
	if (ranks === undefined) return `${devices.length} devices are too few for order statistics`;
	const sorted = devices.map(({ value }) => value).toSorted((a, b) => a - b);
	const [below, above] = [ranks.minimum, ranks.maximum].map((rank) => Math.min(rank, EXTREMES));
	return {
		minimum: sorted.at((below ?? 1) - 1) ?? NaN,
		maximum: sorted.at(-(above ?? 1)) ?? NaN,
		shareOutside: Math.max(ranks.minimum, ranks.maximum) / (devices.length + 1)
	};
}

function around(mean: number, margin: number, factor: number): Between {
	return {
		minimum: Math.exp(mean - margin),
		maximum: Math.exp(mean + margin),
		shareOutside: normalProbability(-factor)
	};
}

function momentsOf(devices: readonly DeviceValue[]): { mean: number; spread: number } {
	const logs = devices.map(({ value }) => Math.log(value));
	const mean = logs.reduce((sum, y) => sum + y, 0) / logs.length;
	const squares = logs.reduce((sum, y) => sum + (y - mean) ** 2, 0);
	return { mean, spread: Math.sqrt(squares / (logs.length - 1)) };
}

function median(values: readonly number[]): number {
	const sorted = values.toSorted((a, b) => a - b);
	const half = sorted.length >> 1;
	const [below = NaN, above = NaN] = [sorted[half - 1], sorted[half]];
	return sorted.length % 2 === 1 ? above : (below + above) / 2;
}
