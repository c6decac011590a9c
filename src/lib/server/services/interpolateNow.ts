import { and, eq, inArray, sql } from 'drizzle-orm';
import { conditionKey as keyOf, type Condition } from '$lib/core/characteristics/condition';
import { biasesBetween } from '$lib/core/distributions/biasesBetween';
import { indexDevices } from '$lib/core/distributions/indexDevices';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import type { Distribution } from '$lib/core/distributions/summary';
import { CHUNK } from '$lib/core/measurements/blocks';
import type { Connection, Database } from '../db/database';
import { findDistributions } from '../db/findDistributions';
import { sweepBlock } from '../db/schema';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import { interpolatedDistributions } from './conditionDistributions';
import { CAPACITANCE, readBasis } from './readBasis';
import { readDevices } from './readSweeps';
import { storeDistributions } from './storeDistributions';

/** Up to here the answer waits: 4 MB are 15,000 devices at 33 biases. */
const MOST_BYTES = 4_000_000;
const MOST_BIASES = 40;

export type InterpolateOutcome =
	/** Every bias inside the measured range has its distribution now. */
	| { readonly status: 'stored' }
	/** Too much for a request: a job computes them. */
	| { readonly status: 'underway'; readonly job: number };

/**
 * Sees to it that biases between measured ones have distributions, where somebody asks for a table
 * with biases that no template names. A moderate amount is computed at once, more in a job. Nothing
 * happens for biases that are stored, or that lie outside of the measured range.
 *
 * @param at a temperature and frequency that was measured
 */
export async function interpolateNow(
	db: Connection,
	{
		product,
		basisHash,
		at,
		biases
	}: {
		readonly product: number;
		readonly basisHash: string;
		readonly at: Omit<Condition, 'reverseVoltage'>;
		readonly biases: readonly number[];
	}
): Promise<InterpolateOutcome> {
	const { temperatureCelsius } = at;
	const sweepKey = keyOf(at);
	const { characteristic } = CAPACITANCE;
	const scope = { product, basisHash, characteristic, temperatureCelsius };
	const stored = (await findDistributions(db, { ...scope, interpolated: biases }))
		.map(({ distribution }) => distribution)
		.filter(
			({ origin, conditionKey }) => origin === 'measured' && sweepOf(conditionKey) === sweepKey
		);
	const biasOf = ({ conditionKey }: Distribution) =>
		readConditionKey(conditionKey).reverseVoltage ?? Number.NaN;
	const measured = stored.filter(({ interpolated }) => !interpolated);
	const known = stored.map(biasOf);
	const lacking = biasesBetween(measured.map(biasOf), biases).filter(
		(bias) => !known.includes(bias)
	);
	const basis = lacking.length === 0 ? undefined : await readBasis(db, product);
	// Newer data have their own job, after which this one may be asked again.
	if (basis?.hash !== basisHash) return { status: 'stored' };
	const sets = basis.inputs.sets.map(({ id }) => id);
	if (lacking.length > MOST_BIASES || (await bytesAt(db, sets, sweepKey)) > MOST_BYTES) {
		const job = await write(db, (tx) =>
			enqueue(tx, {
				kind: 'compute-distributions',
				payload: { product, biases: lacking },
				dedupeKey: `compute-distributions:${product}:${basisHash}:${lacking.join(' ')}`,
				by: null
			})
		);
		return { status: 'underway', job };
	}
	const devices = indexDevices(await readDevices(db, sets), CHUNK, basis.inputs.waferLots);
	const found = await interpolatedDistributions(db, basis, devices, {
		sweepKey,
		measured,
		biases: lacking
	});
	await storeDistributions(db, { product, basisHash }, found);
	return { status: 'stored' };
}

/** Temperature and frequency of a condition. */
function sweepOf(conditionKey: string): string {
	const { temperatureCelsius, frequency } = readConditionKey(conditionKey);
	return keyOf({ temperatureCelsius, ...(frequency !== undefined && { frequency }) });
}

/** How many bytes of packed sweeps these sets hold at a condition. */
async function bytesAt(db: Database, sets: readonly number[], sweepKey: string): Promise<number> {
	const [sum] = await db
		.select({ bytes: sql<number>`coalesce(sum(length(${sweepBlock.values})), 0)` })
		.from(sweepBlock)
		.where(
			and(
				inArray(sweepBlock.set, [...sets]),
				eq(sweepBlock.quantity, 'capacitance'),
				eq(sweepBlock.conditionKey, sweepKey)
			)
		);
	return sum?.bytes ?? 0;
}
