import { and, asc, eq, inArray } from 'drizzle-orm';
import {
	basisText,
	type BasisInputs,
	type LeftOutSweep
} from '$lib/core/distributions/basisInputs';
import type { Database } from '../db/database';
import { lot, measurementSet, product, suspect, upload, verdict } from '../db/schema';
import { sha256 } from './sha256';

export const CAPACITANCE = { characteristic: 'C_tot', unit: 'F', transform: 'ln' } as const;

export interface Basis {
	readonly inputs: BasisInputs;
	readonly hash: string;
	/** The hash of the newest complete distributions; `null` while there are none. */
	readonly completeHash: string | null;
}

/** What the distributions of a product depend on as things stand; `undefined` without the product. */
export async function readBasis(db: Database, productId: number): Promise<Basis | undefined> {
	const [owner] = await db.select().from(product).where(eq(product.id, productId)).limit(1);
	if (owner === undefined) return undefined;

	const sets = await db
		.select({
			id: measurementSet.id,
			sha256: upload.sha256,
			uncertainty: measurementSet.uncertainty
		})
		.from(measurementSet)
		.innerJoin(upload, eq(upload.id, measurementSet.upload))
		.where(and(eq(measurementSet.product, productId), eq(measurementSet.state, 'accepted')))
		.orderBy(asc(measurementSet.id));
	const lots = await db.select().from(lot).where(eq(lot.product, productId));
	const inputs: BasisInputs = {
		partNumber: owner.partNumber,
		characteristic: CAPACITANCE.characteristic,
		transform: CAPACITANCE.transform,
		sets,
		waferLots: new Map(lots.map(({ name, waferLot }) => [name, waferLot])),
		leftOut: await leftOutSweeps(
			db,
			sets.map(({ id }) => id)
		)
	};
	return { inputs, hash: sha256(basisText(inputs)), completeHash: owner.basisHash };
}

/** Sweeps a verdict excludes, and suspects that still wait for one. The newest verdict holds. */
async function leftOutSweeps(db: Database, sets: readonly number[]): Promise<LeftOutSweep[]> {
	if (sets.length === 0) return [];
	const suspects = await db
		.select()
		.from(suspect)
		.where(inArray(suspect.set, [...sets]));
	const verdicts = await db
		.select()
		.from(verdict)
		.where(inArray(verdict.set, [...sets]))
		.orderBy(asc(verdict.id));

	const keyOf = (of: { set: number; device: number; conditionKey: string }) =>
		`${of.set} ${of.device} ${of.conditionKey}`;
	const leftOut = new Map<string, LeftOutSweep>();
	for (const { set, device, conditionKey } of suspects) {
		const sweep = { set, device, conditionKey };
		leftOut.set(keyOf(sweep), { ...sweep, why: 'quarantined' });
	}
	for (const { set, device, conditionKey, decision } of verdicts) {
		const sweep = { set, device, conditionKey };
		if (decision === 'keep') leftOut.delete(keyOf(sweep));
		else leftOut.set(keyOf(sweep), { ...sweep, why: 'excluded' });
	}
	return [...leftOut.values()];
}
