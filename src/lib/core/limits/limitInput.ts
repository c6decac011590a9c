import type { Distribution } from '../distributions/summary';
import type { Basis } from './basis';
import { engineVersion } from './engineVersion';
import type { Side } from './allowance';

export interface LimitInput {
	readonly partNumber: string;
	readonly distribution: Distribution;
	readonly unit: string;
	readonly unitScale: number;
	readonly declaredBasis: Basis;
	readonly sides: readonly Side[];
	/** Hash of the policy version's rules. */
	readonly policyHash: string;
	/** Whether single devices matter: order statistics, and the yield of a test. */
	readonly usesExtremes: boolean;
	/** The factor of a whole-curve policy. */
	readonly widening?: number | undefined;
}

/**
 * Everything a limit depends on, as one text in one order; its hash is the trace from a printed
 * number to its devices. It covers the summary with the stated uncertainty, the sums of each lot
 * and wafer, the outermost devices where they matter, the unit, the basis rule, the policy and the engine.
 */
export function limitInputText(input: LimitInput): string {
	const { groups, extremes, ...summary } = input.distribution;
	return JSON.stringify({
		engine: engineVersion,
		partNumber: input.partNumber,
		policy: input.policyHash,
		unit: [input.unit, input.unitScale],
		basis: input.declaredBasis,
		sides: input.sides,
		summary: Object.entries(summary).sort(([a], [b]) => (a < b ? -1 : 1)),
		groups: groups.map((of) => [
			of.lot,
			of.waferLot,
			of.wafer,
			of.sampleSize,
			of.mean,
			of.sumOfSquares,
			of.lowest,
			of.highest
		]),
		...(input.usesExtremes ? { extremes } : {}),
		...(input.widening === undefined ? {} : { widening: input.widening })
	});
}
