import { conditionKey } from '$lib/core/characteristics/condition';
import { CHUNK, packMatrix } from '$lib/core/measurements/blocks';
import type { Connection } from '$lib/server/db/database';
import {
	deviceBlock,
	die,
	lot,
	measurementSet,
	person,
	product,
	sweepBlock,
	upload
} from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';

export const ENGINEER = 'ida';
const AT = '2026-01-05T08:00:00.000Z';

export interface SampleDevice {
	readonly lot: string;
	readonly wafer: string;
	readonly name: string;
}

/** A person, a die and a product to measure. */
export async function insertProduct(db: Connection, partNumber = 'LKT-1130'): Promise<number> {
	return write(db, async (tx) => {
		await tx
			.insert(person)
			.values({
				id: ENGINEER,
				email: 'product@larkmoor.test',
				name: 'Ida Sandvik',
				passwordHash: '-',
				createdAt: AT
			})
			.onConflictDoNothing();
		const [chip] = await tx
			.insert(die)
			.values({ name: `die of ${partNumber}`, facts: {}, createdAt: AT })
			.returning({ id: die.id });
		const [made] = await tx
			.insert(product)
			.values({
				partNumber,
				die: chip?.id ?? 0,
				productClass: 'tuning',
				package: 'SOD-323',
				createdAt: AT
			})
			.returning({ id: product.id });
		return made?.id ?? 0;
	});
}

/** Sweeps as the import stores them: one matrix a temperature, in chunks, capacitances in pF. */
export async function insertAcceptedSet(
	db: Connection,
	from: {
		readonly product: number;
		readonly sha256: string;
		readonly uncertainty: number | null;
		readonly devices: readonly SampleDevice[];
		readonly biases: readonly number[];
		readonly frequency: number;
		/** By temperature in °C: device by device, bias by bias, in pF; NaN is absent. */
		readonly picofarads: ReadonlyMap<number, Float64Array>;
	}
): Promise<number> {
	const { devices, biases } = from;
	return write(db, async (tx) => {
		const [received] = await tx
			.insert(upload)
			.values({
				product: from.product,
				fileName: `${from.sha256}.csv`,
				sha256: from.sha256,
				byteSize: 1,
				storageKey: from.sha256,
				state: 'accepted',
				uploadedBy: ENGINEER,
				uploadedAt: AT
			})
			.returning({ id: upload.id });
		const [accepted] = await tx
			.insert(measurementSet)
			.values({
				product: from.product,
				upload: received?.id ?? 0,
				setup: {},
				uncertainty: from.uncertainty,
				state: 'accepted',
				acceptedBy: ENGINEER,
				acceptedAt: AT
			})
			.returning({ id: measurementSet.id });
		const set = accepted?.id ?? 0;
		for (const name of new Set(devices.map((of) => of.lot))) {
			await tx
				.insert(lot)
				.values({ product: from.product, name, waferLot: name })
				.onConflictDoNothing();
		}
		for (let chunk = 0; chunk * CHUNK < devices.length; chunk++) {
			const [first, end] = [chunk * CHUNK, (chunk + 1) * CHUNK];
			const names = devices.slice(first, end);
			await tx.insert(deviceBlock).values({
				set,
				chunk,
				devices: {
					lot: names.map((of) => of.lot),
					wafer: names.map((of) => of.wafer),
					site: names.map(() => ''),
					element: names.map(() => ''),
					name: names.map((of) => of.name)
				}
			});
			for (const [temperatureCelsius, values] of from.picofarads) {
				await tx.insert(sweepBlock).values({
					set,
					quantity: 'capacitance',
					conditionKey: conditionKey({ temperatureCelsius, frequency: from.frequency }),
					chunk,
					gridHash: 'grid',
					grid: [...biases],
					unitScale: 1e-12,
					values: Buffer.from(packMatrix(values.slice(first * biases.length, end * biases.length)))
				});
			}
		}
		return set;
	});
}
