import type { BoundTexts, LimitBinding } from '$lib/core/datasheet/binding';
import { inUnit } from '$lib/core/datasheet/boundTexts';
import type { Basis } from '$lib/core/limits/basis';
import type { LimitRow } from '$lib/core/limits/limit';
import type { Connection } from '../db/database';
import { listOverrides } from '../db/listOverrides';

/**
 * What a place prints: the machine's digits, or those that a person decided for the same condition,
 * policy and basis. A decision is kept against what the machine says now, so that the question is
 * asked again once that moves.
 */
export async function decidedTexts(
	db: Connection,
	product: number,
	of: {
		readonly row: Pick<LimitRow, 'characteristic' | 'conditionKey'>;
		readonly policyVersion: number;
		readonly basis: Basis;
		readonly machine: BoundTexts;
	}
): Promise<Pick<LimitBinding, 'printed' | 'kept'>> {
	const { row, machine, policyVersion, basis } = of;
	const { characteristic, conditionKey } = row;
	const standing = await listOverrides(db, { product, characteristic, policyVersion, basis });
	const decided = standing.get(conditionKey);
	if (decided === undefined) return { printed: machine, kept: null };
	const { decision, reason, by, at } = decided;
	const { minimum, maximum } = inUnit(
		{ ...decision, typical: null },
		machine.unit,
		machine.unitScale
	);
	return {
		printed: {
			...machine,
			minimum: minimum ?? machine.minimum,
			maximum: maximum ?? machine.maximum
		},
		kept: { reason, by, at, against: machine }
	};
}
