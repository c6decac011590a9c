import { and, eq } from 'drizzle-orm';
import { setCounts } from '$lib/core/measurements/counts';
import { measurementSetup } from '$lib/core/measurements/setup';
import type { Database } from './database';
import { measurementSet, person, product, upload } from './schema';

export type FoundSet = NonNullable<Awaited<ReturnType<typeof findMeasurementSet>>>;

/** An accepted measurement set, or `undefined`; one that is still being staged isn't there yet. */
export async function findMeasurementSet(db: Database, id: number) {
	const [found] = await db
		.select({
			id: measurementSet.id,
			product: measurementSet.product,
			partNumber: product.partNumber,
			upload: upload.id,
			fileName: upload.fileName,
			sha256: upload.sha256,
			byteSize: upload.byteSize,
			uploadedAt: upload.uploadedAt,
			setup: measurementSet.setup,
			uncertainty: measurementSet.uncertainty,
			counts: measurementSet.counts,
			acceptedAt: measurementSet.acceptedAt,
			acceptedByName: person.name
		})
		.from(measurementSet)
		.innerJoin(upload, eq(upload.id, measurementSet.upload))
		.innerJoin(product, eq(product.id, measurementSet.product))
		.innerJoin(person, eq(person.id, measurementSet.acceptedBy))
		.where(and(eq(measurementSet.id, id), eq(measurementSet.state, 'accepted')))
		.limit(1);
	if (found === undefined) return undefined;
	return {
		...found,
		setup: measurementSetup.parse(found.setup),
		counts: setCounts.parse(found.counts)
	};
}
