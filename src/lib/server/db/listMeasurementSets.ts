import { and, desc, eq } from 'drizzle-orm';
import { setCounts } from '$lib/core/measurements/counts';
import { measurementSetup } from '$lib/core/measurements/setup';
import type { Database } from './database';
import { measurementSet, person, upload } from './schema';

/** The accepted measurement sets of a product, newest first. */
export async function listMeasurementSets(db: Database, productId: number) {
	const sets = await db
		.select({
			id: measurementSet.id,
			fileName: upload.fileName,
			setup: measurementSet.setup,
			uncertainty: measurementSet.uncertainty,
			counts: measurementSet.counts,
			acceptedAt: measurementSet.acceptedAt,
			acceptedByName: person.name
		})
		.from(measurementSet)
		.innerJoin(upload, eq(upload.id, measurementSet.upload))
		.innerJoin(person, eq(person.id, measurementSet.acceptedBy))
		.where(and(eq(measurementSet.product, productId), eq(measurementSet.state, 'accepted')))
		.orderBy(desc(measurementSet.id));
	return sets.map((set) => ({
		...set,
		setup: measurementSetup.parse(set.setup),
		counts: setCounts.parse(set.counts)
	}));
}
