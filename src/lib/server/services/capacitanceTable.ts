import { eq } from 'drizzle-orm';
import { conditionKey } from '$lib/core/characteristics/condition';
import type { Basis } from '$lib/core/limits/basis';
import { checkTable } from '$lib/core/limits/checkTable';
import { computeLimitRow } from '$lib/core/limits/computeLimitRow';
import type { CurveWidening } from '$lib/core/limits/curveWidening';
import { engineVersion } from '$lib/core/limits/engineVersion';
import type { LimitRow } from '$lib/core/limits/limit';
import { limitInputText } from '$lib/core/limits/limitInput';
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
import { rememberedRows, rememberRows } from './limitMemo';
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
				conditionKey: conditionKey({
					temperatureCelsius,
					...(frequency === undefined ? {} : { frequency })
				}),
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
	const { request, owner, policy, unit } = wanted;
	const { declaredBasis = 'characterized', sides = ['minimum', 'maximum'] } = request;
	const isTested = declaredBasis === 'tested' || policy.rules.guardBand !== undefined;
	const inputs = wanted.stored.map(({ condition, distribution }) => ({
		condition,
		distribution,
		inputHash: sha256(
			limitInputText({
				partNumber: owner.partNumber,
				distribution,
				...unit,
				declaredBasis,
				sides,
				policyHash: policy.hash,
				usesExtremes: policy.rules.method === 'order' || isTested,
				widening: wanted.widening?.widening
			})
		)
	}));
	const byBias = new Map(inputs.map((input) => [input.condition.reverseVoltage, input]));
	const asked = [...new Set(wanted.biases)].flatMap((bias) => byBias.get(bias) ?? []);
	const known = await rememberedRows(
		db,
		policy.id,
		asked.map(({ inputHash }) => inputHash)
	);
	const fresh = asked
		.filter(({ inputHash }) => !known.has(inputHash))
		.map(({ condition, distribution, inputHash }) =>
			computeLimitRow(distribution, policy.rules, {
				policyVersion: policy.id,
				condition,
				...unit,
				inputHash,
				sides,
				declaredBasis,
				widening: wanted.widening
			})
		);
	if (request.isKept !== false) await rememberRows(db, fresh);
	for (const row of fresh) known.set(row.inputHash, row);

	return wanted.biases.map((bias) => {
		const input = byBias.get(bias);
		const row = input === undefined ? undefined : known.get(input.inputHash);
		return row ?? notMeasured(bias, wanted);
	});
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
