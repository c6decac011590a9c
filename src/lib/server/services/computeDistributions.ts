import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { conditionKey as keyOf } from '$lib/core/characteristics/condition';
import { computeDistribution } from '$lib/core/distributions/computeDistribution';
import { ConditionColumns } from '$lib/core/distributions/conditionColumns';
import { indexDevices, type DeviceIndex } from '$lib/core/distributions/indexDevices';
import { packGroups } from '$lib/core/distributions/packGroups';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import type { Distribution } from '$lib/core/distributions/summary';
import { CHUNK } from '$lib/core/measurements/blocks';
import { limitMessages } from '$lib/core/messages/limits';
import { appendAudit } from '../db/appendAudit';
import type { Connection } from '../db/database';
import { distribution, product } from '../db/schema';
import { write } from '../db/write';
import type { JobContext, JobHandler } from '../work/jobHandler';
import { CAPACITANCE, readBasis, type Basis } from './readBasis';
import { readDevices, readSweeps, sweepConditions } from './readSweeps';

export const computeDistributionsPayload = z.object({ product: z.number().int() });

/** Rows of one transaction: 8 take about 2 ms to write. */
const ROWS_A_WRITE = 8;

export interface ComputedDistributions {
	readonly basisHash: string | null;
	readonly distributions: number;
}

/**
 * basis → devices → sweeps of a condition → columns → distributions → stored → complete
 *
 * Works condition by condition, so that memory holds one block and one condition's columns. The
 * product points at the new distributions only in the transaction that completes them; if a set or
 * verdict changed meanwhile, the work starts again. Older distributions stay, since published
 * datasheets trace to them.
 */
export const computeDistributions: JobHandler = async ({ db }, payload, job) => {
	const { product: productId } = computeDistributionsPayload.parse(payload);
	for (;;) {
		const basis = await readBasis(db, productId);
		if (basis === undefined) return { basisHash: null, distributions: 0 };

		const stored = await storeDistributions(db, productId, basis, job);
		const isComplete = await complete(db, productId, basis, stored);
		if (isComplete) {
			return {
				basisHash: basis.inputs.sets.length === 0 ? null : basis.hash,
				distributions: stored
			} satisfies ComputedDistributions;
		}
		if (!(await job.isCurrent())) return { basisHash: null, distributions: 0 };
	}
};

async function storeDistributions(
	db: Connection,
	productId: number,
	basis: Basis,
	job: JobContext
): Promise<number> {
	const sets = basis.inputs.sets.map(({ id }) => id);
	const devices = indexDevices(await readDevices(db, sets), CHUNK, basis.inputs.waferLots);
	const conditions = await sweepConditions(db, sets);
	let stored = 0;
	for (const [done, condition] of conditions.entries()) {
		job.report({
			done,
			total: conditions.length,
			words: limitMessages.computingAt(readConditionKey(condition).temperatureCelsius)
		});
		const distributions = await distributionsAt(db, basis, devices, condition);
		for (let first = 0; first < distributions.length; first += ROWS_A_WRITE) {
			const rows = distributions.slice(first, first + ROWS_A_WRITE).map((of) => {
				const { groups, extremes, ...summary } = of;
				return {
					product: productId,
					characteristic: of.characteristic,
					conditionKey: of.conditionKey,
					basisHash: basis.hash,
					summary,
					groups: Buffer.from(packGroups({ groups, extremes }))
				};
			});
			await write(db, (tx) => tx.insert(distribution).values(rows).onConflictDoNothing());
		}
		stored += distributions.length;
	}
	job.report({
		done: conditions.length,
		total: conditions.length,
		words: limitMessages.computed(stored)
	});
	return stored;
}

/** The distributions at every bias of one temperature and frequency. */
async function distributionsAt(
	db: Connection,
	{ inputs }: Basis,
	devices: DeviceIndex,
	sweepKey: string
): Promise<Distribution[]> {
	const leftOut = inputs.leftOut.filter(({ conditionKey }) => conditionKey === sweepKey);
	const rowsLeftOut = new Set(leftOut.map(({ set, device }) => `${set} ${device}`));
	const columns = new ConditionColumns(devices);
	const sets = inputs.sets.map(({ id }) => id);
	for await (const matrix of readSweeps(db, sets, sweepKey)) {
		columns.add(matrix, (row) => rowsLeftOut.has(`${matrix.set} ${row}`));
	}

	const condition = readConditionKey(sweepKey);
	return columns.columns().flatMap(({ bias, values, sets: contributing }) => {
		const from = new Set(contributing);
		const stated = inputs.sets.flatMap(({ id, uncertainty }) =>
			from.has(id) && uncertainty !== null ? [uncertainty] : []
		);
		const count = (why: string) =>
			leftOut.filter((sweep) => from.has(sweep.set) && sweep.why === why).length;
		const computed = computeDistribution({
			...CAPACITANCE,
			conditionKey: keyOf({ ...condition, reverseVoltage: bias }),
			values,
			groupOf: devices.groupOf,
			groups: devices.groups,
			sets: contributing,
			uncertainty: stated.length === 0 ? null : Math.max(...stated),
			excluded: count('excluded'),
			quarantined: count('quarantined')
		});
		return computed === undefined ? [] : [computed];
	});
}

/** @returns whether nothing changed since `basis` was read, so that the product now points at it */
async function complete(
	db: Connection,
	productId: number,
	basis: Basis,
	stored: number
): Promise<boolean> {
	return write(db, async (tx) => {
		const now = await readBasis(tx, productId);
		if (now?.hash !== basis.hash) return false;
		const basisHash = basis.inputs.sets.length === 0 ? null : basis.hash;
		if (now.completeHash === basisHash) return true;

		await tx.update(product).set({ basisHash }).where(eq(product.id, productId));
		await appendAudit(tx, {
			action: 'distributions.compute',
			subject: basis.inputs.partNumber,
			by: null,
			details: {
				basisHash,
				previous: now.completeHash,
				sets: basis.inputs.sets.map(({ id }) => id),
				leftOut: basis.inputs.leftOut.length,
				distributions: stored
			}
		});
		return true;
	});
}
