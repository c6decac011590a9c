import { coveringHalfWidth } from '../../../src/lib/core/stats/coveringHalfWidth';
import { findRoot } from '../../../src/lib/core/stats/findRoot';
import { logChiSquareRule } from '../../../src/lib/core/stats/logChiSquareRule';
import type { LotStrata } from '../../../src/lib/core/stats/lotStrata';
import {
	lotsToleranceHalfWidth,
	lotsToleranceMargin
} from '../../../src/lib/core/stats/lotsToleranceMargin';
import { meeOwenHalfWidth, meeOwenMargin } from '../../../src/lib/core/stats/meeOwen';
import { moverHalfWidth, moverMargin } from '../../../src/lib/core/stats/moverMargin';
import { normalLowerTail } from '../../../src/lib/core/stats/normalDistribution';
import { normalQuantile } from '../../../src/lib/core/stats/normalQuantile';
import {
	oneSidedToleranceFactor,
	type TolerancePromise
} from '../../../src/lib/core/stats/toleranceFactor';
import type { Check } from '../check';
import { numberAt, promiseOf, textAt, type Row } from '../rows';

/** A balanced design of lots and devices, and mean squares that came out of it. */
interface Design {
	readonly lots: number;
	readonly perLot: number;
}

const strataOf = ({ lots, perLot }: Design, between: number, within: number): LotStrata => ({
	mean: 0,
	lots,
	effectiveSize: perLot,
	strata: [
		{ variance: between / perLot, degrees: lots - 1, share: 1 },
		{ variance: within, degrees: lots * (perLot - 1), share: 1 - 1 / perLot }
	]
});

type Reach = (strata: LotStrata, promise: TolerancePromise) => number;

/** The limit that takes all devices for one sample. */
const pooledMargin: Reach = ({ lots, effectiveSize, strata }, promise) => {
	const devices = lots * effectiveSize;
	const squares = strata.reduce(
		(sum, { variance, degrees }, i) => sum + variance * degrees * (i === 0 ? effectiveSize : 1),
		0
	);
	return oneSidedToleranceFactor(devices, promise) * Math.sqrt(squares / (devices - 1));
};

const MARGINS: Readonly<Record<string, Reach>> = {
	'naive-pooled': pooledMargin,
	MeeOwen: meeOwenMargin,
	GV: lotsToleranceMargin,
	MOVER: moverMargin
};

const HALF_WIDTHS: Readonly<Record<string, Reach>> = {
	Mee84: meeOwenHalfWidth,
	GV2: lotsToleranceHalfWidth,
	MLS2: moverHalfWidth
};

/**
 * A margin in units of the root of MS within depends on the ratio of the mean squares alone; it is
 * tabulated in the logarithm of the ratio and read by cubic interpolation. Below the table the ratio
 * no longer matters.
 */
function tabulated(design: Design, reach: Reach, promise: TolerancePromise) {
	const [from, step, size] = [-6, 0.32, 51];
	const table = Float64Array.from({ length: size }, (_, i) =>
		Math.log(reach(strataOf(design, Math.exp(from + i * step), 1), promise))
	);
	return (ratio: number) => {
		const position = Math.max(0, (Math.log(ratio) - from) / step);
		const at = Math.min(Math.max(Math.floor(position), 1), size - 3);
		const x = position - at;
		const [a, b, c, d] = [table[at - 1]!, table[at]!, table[at + 1]!, table[at + 2]!];
		return Math.exp(
			b + (x / 2) * (c - a + x * (2 * a - 5 * b + 4 * c - d + x * (3 * (b - c) + d - a)))
		);
	};
}

const tables = new Map<string, (ratio: number) => number>();

/** Rows that differ in the share of the lots only use the same table. */
function remembered(design: Design, reach: Reach, promise: TolerancePromise) {
	const key = JSON.stringify([design, reach.name, promise]);
	const table = tables.get(key) ?? tabulated(design, reach, promise);
	tables.set(key, table);
	return table;
}

/** The confidence a method really has, over all mean squares that the design may give. */
function trueConfidence(row: Row, reach: Reach, isTwoSided: boolean): number {
	const { inputs } = row;
	const design = { lots: numberAt(inputs, 'lots'), perLot: numberAt(inputs, 'per_lot') };
	const promise = promiseOf(inputs);
	const rho = numberAt(inputs, 'rho');
	const expectedBetween = design.perLot * rho + (1 - rho);
	const ofMean = Math.sqrt(expectedBetween / (design.lots * design.perLot));
	const z = normalQuantile(promise.content);
	const least = normalQuantile((1 + promise.content) / 2);
	const reachAt = remembered(design, reach, promise);
	const between = logChiSquareRule(design.lots - 1, 0.3);
	const within = logChiSquareRule(design.lots * (design.perLot - 1), 0.45);
	let confidence = 0;
	for (let i = 0; i < between.nodes.length; i++)
		for (let j = 0; j < within.nodes.length; j++) {
			const weight = between.weights[i]! * within.weights[j]!;
			if (weight < 1e-8) continue;
			const meanSquareBetween = (expectedBetween * between.nodes[i]!) / (design.lots - 1);
			const meanSquareWithin = ((1 - rho) * within.nodes[j]!) / (design.lots * (design.perLot - 1));
			const margin = reachAt(meanSquareBetween / meanSquareWithin) * Math.sqrt(meanSquareWithin);
			if (!isTwoSided) confidence += weight * normalLowerTail((margin - z) / ofMean);
			else if (margin > least) {
				const room = (x: number) => margin - coveringHalfWidth(x, promise.content);
				const farthest = findRoot(room, 0, margin + 10, 1e-6);
				confidence += weight * (2 * normalLowerTail(farthest / ofMean) - 1);
			}
		}
	return confidence;
}

const isCoverage = (row: Row) => row.area === 'D' && row.quantity.startsWith('true coverage');

/** Area D: what confidence the methods really have. */
export const COVERAGE_CHECKS: readonly Check[] = [
	{
		name: 'true confidence of one-sided limits',
		covers: (row) => isCoverage(row) && Object.hasOwn(MARGINS, textAt(row.inputs, 'method')),
		value: (row) =>
			trueConfidence(row, MARGINS[textAt(row.inputs, 'method')] ?? pooledMargin, false)
	},
	{
		name: 'true confidence of two-sided limits',
		covers: (row) => isCoverage(row) && Object.hasOwn(HALF_WIDTHS, textAt(row.inputs, 'method')),
		value: (row) =>
			trueConfidence(row, HALF_WIDTHS[textAt(row.inputs, 'method')] ?? lotsToleranceHalfWidth, true)
	}
];
