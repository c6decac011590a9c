import { lotComponents, nestedComponents, poolGroups } from '../stats/varianceComponents';
import type { DistributionComponents, Group } from './summary';
import { wafersByLot } from './wafersByLot';

/**
 * Variance components of a distribution by its independent lots. Wafers are a level of their own as
 * soon as one lot has two of them and one wafer two devices.
 *
 * @returns `null` for a single lot, and where no lot has two devices that differ
 */
export function componentsOf(groups: readonly Group[]): DistributionComponents | null {
	const lots = wafersByLot(groups);
	const wafers = lots.flat();
	const devices = wafers.reduce((sum, wafer) => sum + wafer.sampleSize, 0);
	if (lots.length < 2) return null;

	if (wafers.length > lots.length && devices > wafers.length) {
		const found = nestedComponents(lots);
		const [k1, k2, k3] = found.coefficients;
		return {
			lot: found.lot,
			wafer: found.wafer,
			device: found.device,
			total: found.total,
			betweenLots: found.betweenLots,
			betweenWafers: found.betweenWafers,
			within: found.withinWafers,
			coefficients: { k1, k2, k3 }
		};
	}
	const pooled = lots.map(poolGroups);
	if (pooled.every(({ sumOfSquares }) => sumOfSquares === 0)) return null;
	const found = lotComponents(pooled);
	return {
		lot: found.lot,
		wafer: null,
		device: found.device,
		total: found.total,
		betweenLots: found.between,
		betweenWafers: null,
		within: found.within,
		coefficients: { k1: null, k2: null, k3: found.effectiveLotSize }
	};
}
