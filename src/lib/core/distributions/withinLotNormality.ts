import { groupBy } from '../groupBy';
import { andersonDarling, residualsWithinLots } from '../stats/andersonDarling';
import { standardDeviation } from '../stats/standardDeviation';
import type { TransformedMembers } from './groupMembers';
import type { DistributionSummary } from './summary';

/** Anderson–Darling has no tabulated distribution below. */
const FEWEST_RESIDUALS = 8;

/**
 * Whether devices spread normally about the mean of their own independent lot.
 *
 * @returns `null` for fewer than eight residuals, or for residuals without spread
 */
export function withinLotNormality(
	members: readonly TransformedMembers[]
): DistributionSummary['normality'] {
	const lots = groupBy(members, ({ name }) => name.waferLot);
	const residuals = residualsWithinLots([...lots.values()].map(waferByWafer));
	if (residuals.length < FEWEST_RESIDUALS || standardDeviation(residuals) === 0) return null;
	const { adjusted, pValue } = andersonDarling(residuals);
	return { statistic: adjusted, pValue };
}

function waferByWafer(lot: readonly TransformedMembers[]): Float64Array {
	const all = new Float64Array(lot.reduce((size, { transformed }) => size + transformed.length, 0));
	let filled = 0;
	for (const { transformed } of lot) {
		all.set(transformed, filled);
		filled += transformed.length;
	}
	return all;
}
