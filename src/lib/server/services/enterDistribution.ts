import {
	CHARACTERISTICS,
	findCharacteristic,
	type Characteristic
} from '$lib/core/characteristics/catalogue';
import {
	condition,
	conditionKey as keyOf,
	type Condition
} from '$lib/core/characteristics/condition';
import { enteredDistribution } from '$lib/core/distributions/enteredDistribution';
import type { EnteredRequest } from '$lib/core/distributions/enteredRequest';
import { TRANSFORMS } from '$lib/core/distributions/transforms';
import { usableEntered } from '$lib/core/distributions/usableEntered';
import { distributionMessages } from '$lib/core/messages/distributions';
import { productMessages } from '$lib/core/messages/products';
import { appendAudit } from '../db/appendAudit';
import { findProductByPartNumber } from '../db/findProductByPartNumber';
import { listMeasuredKeys } from '../db/listMeasuredKeys';
import { enteredDistribution as enteredTable } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';

export type EnterOutcome =
	| {
			readonly status: 'entered';
			readonly conditionKey: string;
			/** The mean turned back, SI. */
			readonly typical: number;
	  }
	| {
			readonly status: 'refused';
			readonly why: 'noProduct' | 'notAnswerable' | 'measured';
			readonly message: string;
	  };

/** From here up a capacitance in F is no diode's: the mean was given in another unit. */
const IMPLAUSIBLE = 1;

/**
 * Stores a distribution of which only a summary exists, with the reason and where it comes from. It
 * is refused where devices are measured, and no longer used once they are. Nothing is overwritten:
 * the newest entry of a condition holds.
 */
export async function enterDistribution(
	{ db }: Pick<Stores, 'db'>,
	{
		partNumber,
		by,
		...asked
	}: EnteredRequest & { readonly partNumber: string; readonly by: string }
): Promise<EnterOutcome> {
	const characteristic = findCharacteristic(asked.characteristic);
	if (characteristic === undefined) {
		const known = CHARACTERISTICS.map(({ key }) => key);
		return notAnswerable(distributionMessages.unknownCharacteristic(asked.characteristic, known));
	}
	const { key, unit } = characteristic;
	const at = condition.parse(asked);
	const problem = conditionProblem(characteristic, at);
	if (problem !== undefined) return notAnswerable(problem);

	const { n, mean, standardDeviation, transform = characteristic.transform } = asked;
	const entered = { unit, transform, n, mean, standardDeviation };
	const conditionKey = keyOf(at);
	const typical =
		enteredDistribution({ characteristic: key, conditionKey, ...entered }).quantiles[0]?.value ??
		Number.NaN;
	if (unit === 'F' && !(typical > 0 && typical < IMPLAUSIBLE)) {
		return notAnswerable(
			distributionMessages.implausible(
				`${typical.toPrecision(3)} ${unit}`,
				`${TRANSFORMS[transform].prefix}${key} with ${key} in ${unit}`
			)
		);
	}

	return write(db, async (tx): Promise<EnterOutcome> => {
		const product = await findProductByPartNumber(tx, partNumber);
		if (product === undefined) {
			const message = productMessages.productNotFound(partNumber);
			return { status: 'refused', why: 'noProduct', message };
		}
		const keys =
			product.basisHash === null
				? []
				: await listMeasuredKeys(tx, {
						product: product.id,
						basisHash: product.basisHash,
						characteristic: key
					});
		const areSweeps = characteristic.measuredAs === 'sweep';
		const isMeasured = usableEntered([{ conditionKey }], { keys, areSweeps }).length === 0;
		if (isMeasured) {
			return { status: 'refused', why: 'measured', message: distributionMessages.isMeasured() };
		}
		const { reason, source } = asked;
		await tx.insert(enteredTable).values({
			product: product.id,
			characteristic: key,
			conditionKey,
			entered,
			reason,
			source,
			by,
			at: new Date().toISOString()
		});
		await appendAudit(tx, {
			action: 'distribution.enter',
			subject: `${partNumber} ${key} ${conditionKey}`,
			by,
			details: { ...entered, reason, source }
		});
		return { status: 'entered', conditionKey, typical };
	});
}

/**
 * Sweeps and what is computed from them state every axis, readings at least the first; none states
 * what is no axis.
 */
function conditionProblem(
	{ key, axes, measuredAs }: Characteristic,
	at: Condition
): string | undefined {
	const stated = condition.keyof().options.filter((part) => at[part] !== undefined);
	const required = measuredAs === 'reading' ? axes.slice(0, 1) : axes;
	const missing = required.find((axis) => !stated.includes(axis));
	if (missing !== undefined) return distributionMessages.conditionMissing(key, missing);
	const unused = stated.find((part) => part !== 'temperatureCelsius' && !axes.includes(part));
	return unused && distributionMessages.conditionUnused(key, unused);
}

function notAnswerable(message: string): EnterOutcome {
	return { status: 'refused', why: 'notAnswerable', message };
}
