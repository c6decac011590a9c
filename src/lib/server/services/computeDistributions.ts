import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { denseBand } from '$lib/core/distributions/biasesBetween';
import { indexDevices } from '$lib/core/distributions/indexDevices';
import type { JointDistribution } from '$lib/core/distributions/jointDistribution';
import { packJoint } from '$lib/core/distributions/packJoint';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { CHUNK } from '$lib/core/measurements/blocks';
import { limitMessages } from '$lib/core/messages/limits';
import { appendAudit } from '../db/appendAudit';
import type { Connection } from '../db/database';
import { jointDistribution, product } from '../db/schema';
import { write } from '../db/write';
import type { JobContext, JobHandler } from '../work/jobHandler';
import { enqueueAssessment } from './assessReleases';
import { conditionDistributions } from './conditionDistributions';
import { currentDistributions } from './currentDistributions';
import {
	coefficientsDerived,
	qualityDerived,
	sweptDerived,
	type SweptColumns
} from './derivedDistributions';
import { derivedWanted } from './derivedWanted';
import { enqueueFits } from './fitSweepsJob';
import { readBasis, type Basis } from './readBasis';
import { readingDistribution } from './readingDistribution';
import { readingSeries, type ReadingSeriesKey } from './readReadings';
import { readDevices, sweepConditions } from './readSweeps';
import { storeDistributions } from './storeDistributions';
import { templateBiases } from './templateBiases';

export const computeDistributionsPayload = z.object({
	product: z.number().int(),
	/** Further biases in V, beside those that the product's templates name. */
	biases: z.array(z.number()).optional(),
	/** Whether a dense band of biases for the chart is wanted, too. */
	isBand: z.boolean().optional()
});
type ComputeDistributionsPayload = z.infer<typeof computeDistributionsPayload>;

export interface ComputedDistributions {
	readonly basisHash: string | null;
	readonly distributions: number;
}

/**
 * basis → devices → distributions of each sweep condition, then of each series of readings and each
 * temperature of currents, then of what is derived from several of them → stored → complete
 *
 * Works condition by condition. Beside the measured biases it computes those that the product's
 * templates and the payload name, interpolated within each sweep; a dense band only when asked. The
 * product points at the new distributions only in the transaction that completes them; if a set or
 * verdict changed meanwhile, the work starts again. Older distributions stay, since published
 * datasheets trace to them.
 */
export const computeDistributions: JobHandler = async ({ db }, payload, job) => {
	const wanted = computeDistributionsPayload.parse(payload);
	const { product: productId } = wanted;
	for (;;) {
		const basis = await readBasis(db, productId);
		if (basis === undefined) return { basisHash: null, distributions: 0 };

		const stored = await computeAll(db, wanted, basis, job);
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

async function computeAll(
	db: Connection,
	{ product: productId, biases = [], isBand = false }: ComputeDistributionsPayload,
	basis: Basis,
	job: JobContext
): Promise<number> {
	const owner = { product: productId, basisHash: basis.hash };
	const sets = basis.inputs.sets.map(({ id }) => id);
	const devices = indexDevices(await readDevices(db, sets), CHUNK, basis.inputs.waferLots);
	const sweeps = await sweepConditions(db, sets);
	const readings = await readingSeries(db, sets);
	const currents = await sweepConditions(db, sets, 'current');
	const named = [...biases, ...(await templateBiases(db, productId))];
	const total = sweeps.length + readings.length + currents.length;
	const reportAt = (done: number, conditionKey: string) => {
		const { temperatureCelsius } = readConditionKey(conditionKey);
		job.report({ done, total, words: limitMessages.computingAt(temperatureCelsius) });
	};
	const derived = await derivedWanted(db, productId);
	const owned = { basis, devices };
	// Of the other biases no column is held in memory beyond its own condition.
	const kept = new Set([...derived.coefficients, ...resistanceBiases(readings)]);
	const swept: SweptColumns[] = [];
	let stored = 0;
	for (const [done, sweepKey] of sweeps.entries()) {
		reportAt(done, sweepKey);
		const { measured, interpolated, joint, columns } = await conditionDistributions(
			db,
			basis,
			devices,
			{
				sweepKey,
				asked: (grid) => [...named, ...(isBand ? denseBand(grid) : [])]
			}
		);
		const here = { sweepKey, columns };
		const found = [...measured, ...interpolated, ...sweptDerived(owned, here, derived)];
		swept.push({ ...here, columns: columns.filter(({ bias }) => kept.has(bias)) });
		await storeDistributions(db, owner, found);
		stored += found.length;
		if (joint !== undefined) await storeJoint(db, owner, joint);
	}
	for (const [position, series] of readings.entries()) {
		reportAt(sweeps.length + position, series.conditionKey);
		const found = await readingDistribution(db, basis, devices, series);
		if (found === undefined) continue;
		await storeDistributions(db, owner, [found]);
		stored += 1;
	}
	for (const [position, currentKey] of currents.entries()) {
		reportAt(sweeps.length + readings.length + position, currentKey);
		const found = await currentDistributions(db, basis, devices, currentKey);
		await storeDistributions(db, owner, found);
		stored += found.length;
	}
	const across = [
		...coefficientsDerived(owned, swept, derived),
		...(await qualityDerived(db, owned, swept, readings))
	];
	await storeDistributions(db, owner, across);
	stored += across.length;
	job.report({ done: total, total, words: limitMessages.computed(stored) });
	return stored;
}

/** At which reverse biases a series resistance was read. */
function resistanceBiases(readings: readonly ReadingSeriesKey[]): number[] {
	return readings
		.filter(({ characteristic }) => characteristic === 'r_s')
		.flatMap(({ conditionKey }) => readConditionKey(conditionKey).reverseVoltage ?? []);
}

async function storeJoint(
	db: Connection,
	owner: { readonly product: number; readonly basisHash: string },
	joint: JointDistribution
): Promise<void> {
	const { characteristic, conditionKey } = joint;
	const row = { ...owner, characteristic, conditionKey, joint: Buffer.from(packJoint(joint)) };
	await write(db, (tx) => tx.insert(jointDistribution).values(row).onConflictDoNothing());
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
		if (basisHash !== null) {
			await enqueueAssessment(tx, productId, basisHash);
			await enqueueFits(tx, productId, basisHash);
		}
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
