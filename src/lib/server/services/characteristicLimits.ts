import { eq } from 'drizzle-orm';
import { findCharacteristic, type Characteristic } from '$lib/core/characteristics/catalogue';
import { conditionKey, type Condition } from '$lib/core/characteristics/condition';
import { describeCondition } from '$lib/core/characteristics/describeCondition';
import { matchConditions } from '$lib/core/characteristics/matchConditions';
import type { Side } from '$lib/core/limits/allowance';
import type { Basis } from '$lib/core/limits/basis';
import { characteristicUnit } from '$lib/core/limits/characteristicUnit';
import { engineVersion } from '$lib/core/limits/engineVersion';
import type { LimitRow } from '$lib/core/limits/limit';
import type { TableUnit } from '$lib/core/limits/tableUnit';
import { medianOf } from '$lib/core/limits/typicalValue';
import { unmeasuredRow } from '$lib/core/limits/unmeasuredRow';
import { characteristicMessages } from '$lib/core/messages/characteristics';
import { limitMessages } from '$lib/core/messages/limits';
import type { Connection } from '../db/database';
import { findCharacteristicDistributions } from '../db/findCharacteristicDistributions';
import type { StoredDistribution } from '../db/findDistributions';
import { findPolicyVersion } from '../db/findPolicies';
import { product } from '../db/schema';
import { rememberedLimits } from './rememberedLimits';
import { sha256 } from './sha256';

export interface CharacteristicLimitsRequest {
	readonly product: number;
	/** Key of a characteristic that is read or derived; a swept one has its table. */
	readonly characteristic: string;
	/** Every stored condition, unless said otherwise. */
	readonly conditions?: readonly Condition[] | undefined;
	readonly policyVersion: number;
	/** What stands behind the limits; `characterized`, unless said otherwise. */
	readonly declaredBasis?: Basis | undefined;
	/** Limits promised at once; those the catalogue names, unless said otherwise. */
	readonly sides?: readonly Side[] | undefined;
	/** The unit of the rows; one that suits the typical values, unless said otherwise. */
	readonly unit?: TableUnit | undefined;
	/** Whether what is computed is kept; yes, unless said otherwise. */
	readonly isKept?: boolean | undefined;
}

/** An answer has no `status`; only a refusal has. */
export type CharacteristicLimits =
	| (TableUnit & {
			readonly characteristic: Characteristic;
			/** One row a condition, in the order asked. */
			readonly rows: readonly LimitRow[];
			/** What the rows rest on. */
			readonly distributions: readonly StoredDistribution[];
	  })
	| { readonly status: 'refused'; readonly message: string };

/**
 * Minimum, typical and maximum of single readings, or of what is derived device by device, by one
 * policy: the engine behind capacitance tables, and the same memo. A condition that states less than
 * was measured (no pulse duration) is answered where a single stored one agrees with it.
 */
export async function characteristicLimits(
	db: Connection,
	request: CharacteristicLimitsRequest
): Promise<CharacteristicLimits> {
	const [owner] = await db.select().from(product).where(eq(product.id, request.product)).limit(1);
	if (owner === undefined || owner.basisHash === null)
		return refuse(limitMessages.noDistributions());
	const policy = await findPolicyVersion(db, request.policyVersion);
	if (policy === undefined) return refuse(limitMessages.noSuchPolicy(request.policyVersion));
	const characteristic = findCharacteristic(request.characteristic);
	const stored =
		characteristic === undefined
			? []
			: await findCharacteristicDistributions(db, {
					product: owner.id,
					basisHash: owner.basisHash,
					characteristic: characteristic.key
				});
	if (characteristic === undefined || stored.length === 0)
		return refuse(characteristicMessages.nothingStored(request.characteristic));

	const unit =
		request.unit ??
		characteristicUnit(
			characteristic,
			stored.map(({ distribution }) => medianOf(distribution))
		);
	const places = (request.conditions ?? stored.map(({ condition }) => condition)).map((asked) => ({
		asked,
		found: matchConditions(stored, asked)
	}));
	const chosen = places.flatMap(({ found }) => (found.length === 1 ? found : []));
	const computed = await rememberedLimits(db, chosen, {
		partNumber: owner.partNumber,
		policy,
		unit,
		declaredBasis: request.declaredBasis ?? 'characterized',
		sides: request.sides ?? characteristic.promised,
		symbol: characteristic.key,
		isKept: request.isKept
	});
	const known = new Map(computed.map((row) => [row.conditionKey, row]));
	const rows = places.map(({ asked, found }): LimitRow => {
		const [only] = found;
		const row = found.length === 1 && only && known.get(conditionKey(only.condition));
		return (
			row ||
			unmeasuredRow(characteristic.key, asked, {
				...unit,
				policyVersion: policy.id,
				inputHash: sha256(
					[
						owner.partNumber,
						owner.basisHash,
						characteristic.key,
						conditionKey(asked),
						policy.hash,
						engineVersion
					].join('\n')
				),
				refusal: absence(characteristic, asked, found.length === 0 ? stored : found)
			})
		);
	});
	return { ...unit, characteristic, rows, distributions: stored };
}

function absence(
	{ key }: Characteristic,
	asked: Condition,
	stored: readonly StoredDistribution[]
): string {
	const say =
		matchConditions(stored, asked).length > 1
			? characteristicMessages.severalConditions
			: characteristicMessages.notMeasuredAt;
	return say(
		key,
		describeCondition(asked),
		stored.map(({ condition }) => describeCondition(condition))
	);
}

function refuse(message: string): CharacteristicLimits {
	return { status: 'refused', message };
}
