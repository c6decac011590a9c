import { eq } from 'drizzle-orm';
import { conditionKey } from '$lib/core/characteristics/condition';
import type { Basis } from '$lib/core/limits/basis';
import { checkTable } from '$lib/core/limits/checkTable';
import type { CurveWidening } from '$lib/core/limits/curveWidening';
import { engineVersion } from '$lib/core/limits/engineVersion';
import type { LimitRow } from '$lib/core/limits/limit';
import type { Side } from '$lib/core/limits/allowance';
import { capacitanceUnit, type TableUnit } from '$lib/core/limits/tableUnit';
import { medianOf } from '$lib/core/limits/typicalValue';
import { unmeasuredRow } from '$lib/core/limits/unmeasuredRow';
import { limitMessages } from '$lib/core/messages/limits';
import type { Connection } from '../db/database';
import { findDistributions, type StoredDistribution } from '../db/findDistributions';
import { findMeasuredConditions } from '../db/findMeasuredConditions';
import { findPolicyVersion, type StoredPolicy } from '../db/findPolicies';
import { product } from '../db/schema';
import { enqueueWidening, storedWidening, type CurveOf } from './curveWidening';
import { interpolateNow } from './interpolateNow';
import { rememberedLimits } from './rememberedLimits';
import { CAPACITANCE } from './readBasis';
import { sha256 } from './sha256';

export interface CapacitanceTableRequest {
	readonly product: number;
	readonly temperatureCelsius: number;
	/** Hz; may be left out where the temperature was measured at one frequency only. */
	readonly frequency?: number | undefined;
	/** V; every measured bias, unless said otherwise. */
	readonly biases?: readonly number[] | undefined;
	readonly policyVersion: number;
	/** What stands behind the limits; `characterized`, unless said otherwise. */
	readonly declaredBasis?: Basis | undefined;
	/** Which limits are promised at once; both, unless said otherwise. */
	readonly sides?: readonly Side[] | undefined;
	/** Whether what is computed is kept, and what has to be simulated is asked for; yes, unless said otherwise. */
	readonly isKept?: boolean | undefined;
}

type RequestParameter = 'product' | 'policyVersion' | 'temperatureCelsius' | 'frequency';

/** A table has no `status`; only a refusal has. */
export type CapacitanceTable =
	| {
			readonly unit: string;
			readonly unitScale: number;
			readonly temperatureCelsius: number;
			readonly frequency: number | undefined;
			readonly rows: LimitRow[];
			/** What the rows rest on, every bias of the table. */
			readonly distributions: readonly StoredDistribution[];
	  }
	| {
			readonly status: 'refused';
			/** The part of the request that can't be answered. */
			readonly parameter: RequestParameter;
			readonly message: string;
	  };

/**
 * Minimum, typical and maximum capacitance at each bias, by one policy, in one unit. Limits that
 * were computed before from the same inputs are read back; new ones are kept.
 */
export async function capacitanceTable(
	db: Connection,
	request: CapacitanceTableRequest
): Promise<CapacitanceTable> {
	const [owner] = await db.select().from(product).where(eq(product.id, request.product)).limit(1);
	const policy = await findPolicyVersion(db, request.policyVersion);
	if (owner === undefined || owner.basisHash === null) {
		return refuse('product', limitMessages.noDistributions());
	}
	if (policy === undefined) {
		return refuse('policyVersion', limitMessages.noSuchPolicy(request.policyVersion));
	}

	const scope = {
		product: owner.id,
		basisHash: owner.basisHash,
		characteristic: CAPACITANCE.characteristic
	};
	const { temperatureCelsius } = request;
	const stored = await findDistributions(db, { ...scope, temperatureCelsius });
	if (stored.length === 0) {
		const measured = await findMeasuredConditions(db, scope);
		const temperatures = [...new Set(measured.map((at) => at.temperatureCelsius))];
		return refuse(
			'temperatureCelsius',
			limitMessages.temperatureNotMeasured(temperatureCelsius, temperatures)
		);
	}
	const frequencies = [...new Set(stored.map(({ condition }) => condition.frequency))];
	const frequency = request.frequency ?? frequencies[0];
	const stated = frequencies.filter((at) => at !== undefined);
	if (request.frequency === undefined && frequencies.length > 1) {
		return refuse('frequency', limitMessages.severalFrequencies(stated));
	}
	const isAtFrequency = ({ condition }: StoredDistribution) => condition.frequency === frequency;
	const atFrequency = stored.filter(isAtFrequency);
	if (atFrequency.length === 0) {
		return refuse('frequency', limitMessages.frequencyNotMeasured(frequency ?? 0, stated));
	}

	const unit = capacitanceUnit(atFrequency.map(({ distribution }) => medianOf(distribution)));
	const biases =
		request.biases ?? atFrequency.flatMap(({ condition }) => condition.reverseVoltage ?? []);
	const at = { temperatureCelsius, ...(frequency === undefined ? {} : { frequency }) };
	// Measured biases are all there: nothing is looked for between them, nor read again.
	const isUnderway =
		request.biases !== undefined &&
		(await interpolateNow(db, { ...scope, at, biases })).status === 'underway';
	const rows = await limitRows(db, {
		request,
		owner: { ...owner, basisHash: owner.basisHash },
		policy,
		stored:
			request.biases === undefined
				? atFrequency
				: (
						await findDistributions(db, { ...scope, temperatureCelsius, interpolated: biases })
					).filter(isAtFrequency),
		isUnderway,
		unit,
		biases,
		frequency,
		widening: await wideningOf(
			db,
			policy,
			{
				...scope,
				conditionKey: conditionKey(at),
				sides: request.sides ?? ['minimum', 'maximum']
			},
			request.isKept
		)
	});
	return {
		...unit,
		temperatureCelsius,
		frequency,
		rows: checkTable(rows),
		distributions: atFrequency
	};
}

/** The whole-curve factor where the policy asks for one; what isn't simulated yet is asked for. */
async function wideningOf(
	db: Connection,
	policy: StoredPolicy,
	curve: CurveOf,
	isKept = true
): Promise<CurveWidening | undefined> {
	if (policy.rules.span === 'each-bias' || policy.rules.method !== 'lots') return undefined;
	const found = await storedWidening(db, curve, policy.rules);
	if (found === undefined && isKept) await enqueueWidening(db, curve, policy.id);
	return found;
}

function refuse(parameter: RequestParameter, message: string): CapacitanceTable {
	return { status: 'refused', parameter, message };
}

interface RowsWanted {
	readonly request: CapacitanceTableRequest;
	readonly owner: { readonly partNumber: string; readonly basisHash: string };
	readonly policy: StoredPolicy;
	readonly stored: readonly StoredDistribution[];
	/** Whether biases between measured ones wait for their distributions. */
	readonly isUnderway: boolean;
	readonly unit: TableUnit;
	readonly biases: readonly number[];
	readonly frequency: number | undefined;
	readonly widening: CurveWidening | undefined;
}

async function limitRows(db: Connection, wanted: RowsWanted): Promise<LimitRow[]> {
	const { request, owner, policy, unit, widening } = wanted;
	const asked = wanted.stored.filter(({ condition }) =>
		wanted.biases.includes(condition.reverseVoltage ?? Number.NaN)
	);
	const computed = await rememberedLimits(db, asked, {
		partNumber: owner.partNumber,
		policy,
		unit,
		declaredBasis: request.declaredBasis ?? 'characterized',
		sides: request.sides ?? ['minimum', 'maximum'],
		widening,
		isKept: request.isKept
	});
	const byBias = new Map(computed.map((row) => [row.condition.reverseVoltage, row]));
	return wanted.biases.map((bias) => byBias.get(bias) ?? notMeasured(bias, wanted));
}

function notMeasured(bias: number, wanted: RowsWanted): LimitRow {
	const { request, owner, policy, unit, frequency, stored } = wanted;
	const condition = {
		temperatureCelsius: request.temperatureCelsius,
		...(frequency === undefined ? {} : { frequency }),
		reverseVoltage: bias
	};
	return unmeasuredRow(CAPACITANCE.characteristic, condition, {
		...unit,
		policyVersion: policy.id,
		inputHash: sha256(
			[owner.partNumber, owner.basisHash, conditionKey(condition), policy.hash, engineVersion].join(
				'\n'
			)
		),
		refusal: absenceOf(bias, stored, wanted.isUnderway)
	});
}

function absenceOf(
	bias: number,
	stored: readonly StoredDistribution[],
	isUnderway: boolean
): string {
	const measured = stored.flatMap(({ condition }) => condition.reverseVoltage ?? []);
	const isBetween = bias > Math.min(...measured) && bias < Math.max(...measured);
	return isBetween && isUnderway
		? limitMessages.biasUnderway(bias)
		: limitMessages.biasNotMeasured(bias, measured);
}
