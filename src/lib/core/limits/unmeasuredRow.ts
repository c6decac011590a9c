import type { Condition } from '../characteristics/condition';
import { conditionKey } from '../characteristics/condition';
import { engineVersion } from './engineVersion';
import type { LimitRow } from './limit';

/** The row of a condition nobody measured: no numbers, and the reason. */
export function unmeasuredRow(
	characteristic: string,
	condition: Condition,
	{
		unit,
		unitScale,
		policyVersion,
		inputHash,
		refusal
	}: {
		readonly unit: string;
		readonly unitScale: number;
		readonly policyVersion: number;
		readonly inputHash: string;
		readonly refusal: string;
	}
): LimitRow {
	return {
		characteristic,
		condition,
		conditionKey: conditionKey(condition),
		unit,
		unitScale,
		minimum: null,
		typical: null,
		maximum: null,
		basis: 'typical',
		refusals: [refusal],
		warnings: [],
		sampleSize: 0,
		independentLots: 0,
		policyVersion,
		inputHash,
		engineVersion
	};
}
