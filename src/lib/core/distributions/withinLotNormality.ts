import { groupBy } from '../groupBy';
import { andersonDarling, residualsWithinLots } from '../stats/andersonDarling';
import { standardDeviation } from '../stats/standardDeviation';
import type { Members } from './groupMembers';
import type { DistributionSummary } from './summary';

/** Anderson–Darling has no tabulated distribution below. */
const FEWEST_RESIDUALS = 8;

/**
 * Whether devices spread normally about the mean of their own independent lot.
 *
 * @returns `null` for fewer than eight residuals, or for residuals without spread
 */
export function withinLotNormality(
	members: readonly Members[],
	apply: (value: number) => number
): DistributionSummary['normality'] {
	const lots = groupBy(members, ({ name }) => name.waferLot);
	const residuals = residualsWithinLots([...lots.values()].map((lot) => transformedOf(lot, apply)));
	if (residuals.length < FEWEST_RESIDUALS || standardDeviation(residuals) === 0) return null;
	const { adjusted, pValue } = andersonDarling(residuals);
	return { statistic: adjusted, pValue };
}

/** The values of all wafers of a lot, wafer by wafer. */
function transformedOf(lot: readonly Members[], apply: (value: number) => number): Float64Array {
	const all = new Float64Array(lot.reduce((size, { sorted }) => size + sorted.length, 0));
	let filled = 0;
	for (const { sorted } of lot) {
		for (let i = 0; i < sorted.length; i++) all[filled++] = apply(sorted[i]!);
	}
	return all;
}
