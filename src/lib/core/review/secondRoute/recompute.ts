import { EXTREMES } from '../../distributions/extremes';
import type { Transform } from '../../distributions/summary';
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
	/** How the values are taken before they are summed up; `ln`, unless said otherwise. */
	readonly transform?: Transform;
}

/** What lies between the limits before allowances: minimum and maximum in SI. */
type Between = Pick<Recomputed, 'minimum' | 'maximum' | 'shareOutside'>;

/**
 * Minimum, median and maximum from the devices' values by the second route: two passes over the
 * logarithms for mean and spread, the factor by integrating the confidence, ranks by summing the
 * binomial distribution, the median by sorting.
 *
 * @param devices with values in SI, positive where a logarithm is taken
 */
export function recompute(
	devices: readonly DeviceValue[],
	rules: LimitPolicy,
	{ isShared, uncertainty, transform = 'ln' }: RecomputeOptions
): Recomputation {
	if (devices.length < 2)
		return { status: 'refused', reason: `only ${devices.length} measured devices` };
	if (rules.span === 'whole-curve') return { status: 'refused', reason: wholeCurveHasOneRoute() };
	const between = betweenOf(devices, rules, { isShared, transform });
	if (typeof between === 'string') return { status: 'refused', reason: between };

	const added = rules.uncertaintyTreatment === 'not-added' ? 0 : uncertainty;
	const outwards = (value: number, side: Side) => {
		const sign = side === 'minimum' ? -1 : 1;
		const drifted = moved(value, sign, driftOn(rules, side));
		return drifted + sign * Math.abs(drifted) * added;
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
	return 'relative' in by
		? value + sign * Math.abs(value) * by.relative
		: value + sign * by.absolute;
}

/** The raw limits, or why this route has none. */
function betweenOf(
	devices: readonly DeviceValue[],
	rules: LimitPolicy,
	{ isShared, transform }: { readonly isShared: boolean; readonly transform: Transform }
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
				transform,
				isTogether
					? twoSidedFactor(devices.length, assurance)
					: oneSidedFactor(devices.length, assurance)
			);
		case 'sigma':
			return rules.k === undefined
				? 'the policy states no multiple of the standard deviation'
				: pooled(devices, transform, rules.k);
		case 'lots':
			return futureLots(devices, transform, { assurance, isTogether });
		case 'order':
			return ordered(devices, assurance, isTogether);
		default:
			return rules.method satisfies never;
	}
}

function pooled(devices: readonly DeviceValue[], transform: Transform, factor: number): Between {
	const { mean, spread } = momentsOf(devices, transform);
	return around(mean, factor * spread, { factor, transform });
}

function futureLots(
	devices: readonly DeviceValue[],
	transform: Transform,
	{ assurance, isTogether }: { readonly assurance: Assurance; readonly isTogether: boolean }
): Between | string {
	const { to } = WAYS[transform];
	const spread = lotSpread(devices.map((of) => ({ ...of, y: to(of.value) })));
	if (spread === undefined) return 'lots of several devices are needed';
	const margin = isTogether ? lotsHalfWidth(spread, assurance) : lotsMargin(spread, assurance);
	const factor = margin / momentsOf(devices, transform).spread;
	return around(spread.mean, margin, { factor, transform });
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

/** Into what is summed up, and back. */
const WAYS = {
	identity: { to: (value: number) => value, back: (y: number) => y },
	ln: { to: (value: number) => Math.log(value), back: (y: number) => Math.exp(y) },
	log10: { to: (value: number) => Math.log(value) / Math.LN10, back: (y: number) => 10 ** y }
} as const satisfies Record<Transform, unknown>;

function around(
	mean: number,
	margin: number,
	{ factor, transform }: { readonly factor: number; readonly transform: Transform }
): Between {
	const { back } = WAYS[transform];
	return {
		minimum: back(mean - margin),
		maximum: back(mean + margin),
		shareOutside: normalProbability(-factor)
	};
}

function momentsOf(devices: readonly DeviceValue[], transform: Transform) {
	const { to } = WAYS[transform];
	const ys = devices.map(({ value }) => to(value));
	const mean = ys.reduce((sum, y) => sum + y, 0) / ys.length;
	const squares = ys.reduce((sum, y) => sum + (y - mean) ** 2, 0);
	return { mean, spread: Math.sqrt(squares / (ys.length - 1)) };
}

function median(values: readonly number[]): number {
	const sorted = values.toSorted((a, b) => a - b);
	const half = sorted.length >> 1;
	const [below = NaN, above = NaN] = [sorted[half - 1], sorted[half]];
	return sorted.length % 2 === 1 ? above : (below + above) / 2;
}
