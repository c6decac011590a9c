import type { Side } from '$lib/core/limits/allowance';
import type { Basis } from '$lib/core/limits/basis';
import { computeLimitRow } from '$lib/core/limits/computeLimitRow';
import type { CurveWidening } from '$lib/core/limits/curveWidening';
import type { LimitRow } from '$lib/core/limits/limit';
import { limitInputText } from '$lib/core/limits/limitInput';
import type { TableUnit } from '$lib/core/limits/tableUnit';
import type { Connection } from '../db/database';
import type { StoredDistribution } from '../db/findDistributions';
import type { StoredPolicy } from '../db/findPolicies';
import { rememberedRows, rememberRows } from './limitMemo';
import { sha256 } from './sha256';

export interface LimitsBy {
	readonly partNumber: string;
	readonly policy: StoredPolicy;
	readonly unit: TableUnit;
	readonly declaredBasis: Basis;
	readonly sides: readonly Side[];
	/** How the values are called in the derivation; `C`, unless said otherwise. */
	readonly symbol?: string;
	/** Factor of a whole-curve policy. */
	readonly widening?: CurveWidening | undefined;
	/** Whether what is computed is kept; yes, unless said otherwise. */
	readonly isKept?: boolean | undefined;
}

/**
 * The limits of stored distributions, in their order. Limits that were computed before from the same
 * inputs are read back; new ones are kept.
 */
export async function rememberedLimits(
	db: Connection,
	stored: readonly StoredDistribution[],
	{ partNumber, policy, unit, declaredBasis, sides, symbol, widening, isKept = true }: LimitsBy
): Promise<LimitRow[]> {
	const isTested = declaredBasis === 'tested' || policy.rules.guardBand !== undefined;
	const inputs = stored.map(({ condition, distribution }) => ({
		condition,
		distribution,
		inputHash: sha256(
			limitInputText({
				partNumber,
				distribution,
				...unit,
				declaredBasis,
				sides,
				policyHash: policy.hash,
				usesExtremes: policy.rules.method === 'order' || isTested,
				widening: widening?.widening
			})
		)
	}));
	const known = await rememberedRows(
		db,
		policy.id,
		inputs.map(({ inputHash }) => inputHash)
	);
	const fresh: LimitRow[] = [];
	const rows = inputs.map(({ condition, distribution, inputHash }) => {
		const before = known.get(inputHash);
		if (before !== undefined) return before;
		const row = computeLimitRow(distribution, policy.rules, {
			policyVersion: policy.id,
			condition,
			...unit,
			inputHash,
			sides,
			declaredBasis,
			widening,
			...(symbol === undefined ? {} : { symbol })
		});
		fresh.push(row);
		return row;
	});
	if (isKept) await rememberRows(db, fresh);
	return rows;
}
