import { eq } from 'drizzle-orm';
import { z } from 'zod';
import { conditionKey as keyOf } from '$lib/core/characteristics/condition';
import { denseBand } from '$lib/core/distributions/biasesBetween';
import { ConditionColumns, type BiasColumn } from '$lib/core/distributions/conditionColumns';
import {
	indexDevices,
	type DeviceIndex,
	type SetDevices
} from '$lib/core/distributions/indexDevices';
import { readConditionKey } from '$lib/core/distributions/readConditionKey';
import { summarizeFits } from '$lib/core/distributions/summarizeFits';
import { CHUNK } from '$lib/core/measurements/blocks';
import { cvMessages } from '$lib/core/messages/cv';
import type { Connection, Database } from '../db/database';
import { findDistributions } from '../db/findDistributions';
import { product, sweepFit } from '../db/schema';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import type { JobHandler } from '../work/jobHandler';
import { interpolatedDistributions } from './conditionDistributions';
import { CAPACITANCE, readBasis, type Basis } from './readBasis';
import { readDevices, readSweeps, sweepConditions } from './readSweeps';
import { setFacts } from './setFacts';
import { storeDistributions } from './storeDistributions';

const fitSweepsPayload = z.object({ product: z.number().int() });

/** The key under which the fits of a basis are asked for. */
export const fitsKey = (productId: number, basisHash: string) =>
	`fit-sweeps:${productId}:${basisHash}`;

/** Has the sweeps of a product fitted and the band between its biases filled. */
export async function enqueueFits(
	tx: Database,
	productId: number,
	basisHash: string
): Promise<number> {
	return enqueue(tx, {
		kind: 'fit-sweeps',
		payload: { product: productId },
		dedupeKey: fitsKey(productId, basisHash),
		by: null
	});
}

/**
 * basis → devices → each temperature and frequency: columns → fits, summed up and stored →
 * distributions at biases between the measured ones, for a smooth band
 *
 * Nothing of it is needed for a limit, so that it comes after the distributions. Newer data have a
 * job of their own: this one then ends.
 */
export const fitSweepsJob: JobHandler = async ({ db }, payload, job) => {
	const { product: productId } = fitSweepsPayload.parse(payload);
	const basis = await readBasis(db, productId);
	const [owner] = await db.select().from(product).where(eq(product.id, productId)).limit(1);
	if (basis === undefined || owner?.basisHash !== basis.hash) return { conditions: 0, devices: 0 };

	const sets = basis.inputs.sets.map(({ id }) => id);
	const names = await readDevices(db, sets);
	const index = indexDevices(names, CHUNK, basis.inputs.waferLots);
	const nameOf = deviceNames(names, index);
	const conditions = await sweepConditions(db, sets);
	let devices = 0;
	for (const [done, sweepKey] of conditions.entries()) {
		if (!(await job.isCurrent())) break;
		const words = cvMessages.fittingAt(readConditionKey(sweepKey).temperatureCelsius);
		job.report({ done, total: conditions.length, words });
		const columns = await columnsAt(db, basis, index, sweepKey);
		const fits = summarizeFits(columns, index, nameOf);
		if (fits !== undefined) {
			const row = { product: productId, basisHash: basis.hash, conditionKey: sweepKey, fits };
			await write(db, (tx) => tx.insert(sweepFit).values(row).onConflictDoNothing());
			devices += fits.devices;
		}
		await fillBand(db, { product: productId, basis, index, sweepKey });
	}
	const total = conditions.length;
	job.report({ done: total, total, words: cvMessages.fitted(devices) });
	return { conditions: total, devices };
};

/** The readings of a condition, device by device, without what verdicts or quarantine leave out. */
async function columnsAt(
	db: Database,
	basis: Basis,
	index: DeviceIndex,
	sweepKey: string
): Promise<BiasColumn[]> {
	const { isLeftOut } = setFacts(basis, sweepKey);
	const columns = new ConditionColumns(index);
	const sets = basis.inputs.sets.map(({ id }) => id);
	for await (const matrix of readSweeps(db, sets, sweepKey))
		columns.add(matrix, (row) => isLeftOut(matrix.set, row));
	return columns.columns();
}

async function fillBand(
	db: Connection,
	at: {
		readonly product: number;
		readonly basis: Basis;
		readonly index: DeviceIndex;
		readonly sweepKey: string;
	}
): Promise<void> {
	const { temperatureCelsius, frequency } = readConditionKey(at.sweepKey);
	const scope = { product: at.product, basisHash: at.basis.hash };
	const stored = await findDistributions(db, {
		...scope,
		...{ characteristic: CAPACITANCE.characteristic, temperatureCelsius, interpolated: 'all' }
	});
	const here = stored.filter(
		({ condition, distribution: of }) =>
			condition.frequency === frequency && of.origin === 'measured'
	);
	const measured = here
		.map(({ distribution }) => distribution)
		.filter(({ interpolated }) => !interpolated);
	const biasesOf = (keys: readonly string[]) =>
		keys.flatMap((key) => readConditionKey(key).reverseVoltage ?? []);
	const known = biasesOf(here.map(({ distribution }) => distribution.conditionKey));
	const biases = denseBand(biasesOf(measured.map(({ conditionKey }) => conditionKey))).filter(
		(bias) => !known.includes(bias)
	);
	const sweepKey = keyOf({ temperatureCelsius, ...(frequency !== undefined && { frequency }) });
	const found = await interpolatedDistributions(db, at.basis, at.index, {
		sweepKey,
		measured,
		biases
	});
	await storeDistributions(db, scope, found);
}

/** What a device is called within its wafer: site, element and name. */
function deviceNames(sets: readonly SetDevices[], index: DeviceIndex): (device: number) => string {
	const places = new Map<number, string>();
	for (const { set, chunks } of sets) {
		const devices = index.devicesOf.get(set);
		for (const { chunk, devices: names } of chunks) {
			for (const [row, name] of names.name.entries()) {
				const device = devices?.[chunk * CHUNK + row] ?? -1;
				if (places.has(device)) continue;
				const parts = [names.site[row], names.element[row], name];
				places.set(device, parts.filter((part) => part !== undefined && part !== '').join(' · '));
			}
		}
	}
	return (device) => places.get(device) ?? '';
}
