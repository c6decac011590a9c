import type { Distribution } from '$lib/core/distributions/summary';
import type { DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import { fixed } from '$lib/core/limits/digits';
import { rowEvidence, type DevicesOutside } from '$lib/core/limits/evidence/rowEvidence';
import type { LimitRow } from '$lib/core/limits/limit';
import type { LimitPolicy } from '$lib/core/limits/policy';
import { gridRow, type GridRow } from './gridRow';

/** A row of the limits grid with what its devices say, as the grid prints it. */
export interface LimitsGridRow extends GridRow {
	/** `1 + 3`: devices beyond the minimum and the maximum. */
	readonly outside: string | null;
	/** More lie outside than the basis allows. */
	readonly isOutsideTooMany: boolean;
	readonly capability: string | null;
	readonly capabilityBound: string | null;
	readonly testMinimum: string | null;
	readonly testMaximum: string | null;
	/** Share of the stored devices that pass the test, or the predicted one, in %. */
	readonly yieldPercent: string | null;
	/** Who decided what is printed, where a person did. */
	readonly decidedBy: string | null;
}

export function limitsGridRow(
	row: LimitRow,
	distribution: Distribution | undefined,
	rules: LimitPolicy,
	decided?: Pick<DecidedLimit, 'by'>
): LimitsGridRow {
	const isCircular = decided === undefined;
	const found =
		distribution === undefined ? undefined : rowEvidence(distribution, row, rules, isCircular);
	const capability = found?.capability ?? null;
	const sides = [found?.minimum ?? null, found?.maximum ?? null];
	const { testYield } = row;
	const share =
		testYield === undefined
			? null
			: testYield.passed === null
				? testYield.predicted
				: testYield.passed / testYield.of;
	return {
		...gridRow(row),
		outside: sides.every((side) => side === null) ? null : sides.map(countText).join(' + '),
		isOutsideTooMany: sides.some(isTooMany),
		capability: capability === null ? null : fixed(capability.index, 2),
		capabilityBound: capability?.lowerBound == null ? null : fixed(capability.lowerBound, 2),
		testMinimum: row.minimum?.test?.text ?? null,
		testMaximum: row.maximum?.test?.text ?? null,
		decidedBy: decided?.by ?? null,
		yieldPercent: share === null ? null : fixed(share * 100, 1)
	};
}

const countText = (side: DevicesOutside | null) =>
	side === null ? '–' : side.count === null ? 'many' : String(side.count);

function isTooMany(side: DevicesOutside | null): boolean {
	return side !== null && side.allowed !== null && (side.count ?? Infinity) > side.allowed;
}
