import type { Basis } from '$lib/core/limits/basis';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { checkDecision } from '$lib/core/limits/decision/checkDecision';
import type { LimitDecision } from '$lib/core/limits/decision/limitDecision';
import { draftMessages } from '$lib/core/messages/datasheet';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';
import { appendAudit } from '../db/appendAudit';
import { findPolicyVersion } from '../db/findPolicies';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { listOverrides } from '../db/listOverrides';
import { limitOverride } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { capacitanceTable } from './capacitanceTable';
import { refused, type Refused } from './editDraft';
import { CAPACITANCE } from './readBasis';

/** Which printed limit of a product is decided. */
export interface LimitPlace {
	readonly partNumber: string;
	readonly conditionKey: string;
	readonly policyVersion: number;
	readonly basis: Basis;
	/** Id of the person who decides. */
	readonly by: string;
}

export interface LimitToDecide extends LimitPlace {
	/** Digits in the unit of the table; `null` where the machine's stay. */
	readonly minimum: string | null;
	readonly maximum: string | null;
	/** U of the production tester in the unit of the table; that of the sets, unless given. */
	readonly testerUncertainty: number | null;
	readonly isOutsideIntended: boolean;
	readonly reason: string;
}

export type DecideOutcome = { readonly status: 'decided' | 'takenBack' } | Refused;

/** Prints another limit than the machine's, by a person's decision with its reason. */
export async function decideLimit(
	{ db }: Pick<Stores, 'db'>,
	wanted: LimitToDecide
): Promise<DecideOutcome> {
	const reason = wanted.reason.trim();
	if (reason === '') return refused(draftMessages.reasonNeeded());
	const product = await findProductByPartNumber(db, wanted.partNumber);
	if (product === undefined) return refused(draftMessages.productUnknown(wanted.partNumber));
	const policy = await findPolicyVersion(db, wanted.policyVersion);
	if (policy === undefined) return refused(draftMessages.policyVersionUnknown());
	const { temperatureCelsius, frequency } = readConditionKey(wanted.conditionKey);
	const table = await capacitanceTable(db, {
		product: product.id,
		temperatureCelsius,
		frequency,
		policyVersion: policy.id,
		declaredBasis: wanted.basis
	});
	if ('status' in table) return refused(table.message);
	const row = table.rows.find(({ conditionKey }) => conditionKey === wanted.conditionKey);
	const distribution = table.distributions.find(
		(of) => of.distribution.conditionKey === wanted.conditionKey
	)?.distribution;
	if (row === undefined || distribution === undefined) {
		return refused(limitsScreenMessages.nothingMeasuredHere());
	}
	const problems = checkDecision(wanted, {
		row,
		rules: policy.rules,
		distribution,
		basis: wanted.basis
	});
	if (problems.length > 0) return refused(problems.join(' '));

	const { unit, unitScale } = table;
	const decision: LimitDecision = {
		minimum: wanted.minimum === row.minimum?.text ? null : wanted.minimum,
		maximum: wanted.maximum === row.maximum?.text ? null : wanted.maximum,
		unit,
		unitScale,
		testerUncertainty:
			wanted.testerUncertainty === null
				? null
				: Number((wanted.testerUncertainty * unitScale).toPrecision(12)),
		isOutsideIntended: wanted.isOutsideIntended,
		machine: {
			minimum: row.minimum?.text ?? null,
			typical: row.typical?.text ?? null,
			maximum: row.maximum?.text ?? null,
			inputHash: row.inputHash
		}
	};
	await keep({ db }, wanted, { product: product.id, decision, reason });
	return { status: 'decided' };
}

/** Takes a decision back: the machine's limits are printed again. What was decided stays on record. */
export async function takeBackDecision(
	{ db }: Pick<Stores, 'db'>,
	wanted: LimitPlace & { readonly reason: string }
): Promise<DecideOutcome> {
	const reason = wanted.reason.trim();
	if (reason === '') return refused(draftMessages.reasonNeeded());
	const product = await findProductByPartNumber(db, wanted.partNumber);
	if (product === undefined) return refused(draftMessages.productUnknown(wanted.partNumber));
	const { characteristic } = CAPACITANCE;
	const standing = await listOverrides(db, { ...wanted, product: product.id, characteristic });
	if (!standing.has(wanted.conditionKey)) {
		return refused(limitsScreenMessages.nothingToTakeBack());
	}
	await keep({ db }, wanted, { product: product.id, decision: null, reason });
	return { status: 'takenBack' };
}

function keep(
	{ db }: Pick<Stores, 'db'>,
	{ partNumber, conditionKey, policyVersion, basis, by }: LimitPlace,
	of: {
		readonly product: number;
		readonly decision: LimitDecision | null;
		readonly reason: string;
	}
): Promise<void> {
	const at = new Date().toISOString();
	const { characteristic } = CAPACITANCE;
	const place = { characteristic, conditionKey, policyVersion, basis };
	return write(db, async (tx) => {
		await tx.insert(limitOverride).values({ ...place, ...of, by, at });
		await appendAudit(tx, {
			action: of.decision === null ? 'limit.takeBack' : 'limit.decide',
			subject: `${partNumber} ${characteristic} at ${conditionKey}`,
			by,
			details: { policyVersion, basis, decision: of.decision, reason: of.reason }
		});
	});
}
