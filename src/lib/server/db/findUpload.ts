import { eq } from 'drizzle-orm';
import { uploadPreview } from '$lib/core/measurements/preview';
import { uploadProblems } from '$lib/core/measurements/problems';
import { confirmedMapping } from '$lib/core/measurements/requestedMapping';
import type { Database } from './database';
import { measurementSet, person, product, upload } from './schema';

export type FoundUpload = NonNullable<Awaited<ReturnType<typeof findUpload>>>;

/** An upload with its product, its preview and what stood in its way; `undefined` if there is none. */
export async function findUpload(db: Database, id: number) {
	const [found] = await db
		.select({
			upload,
			partNumber: product.partNumber,
			uploadedByName: person.name,
			set: measurementSet.id
		})
		.from(upload)
		.innerJoin(product, eq(product.id, upload.product))
		.innerJoin(person, eq(person.id, upload.uploadedBy))
		.leftJoin(measurementSet, eq(measurementSet.upload, upload.id))
		.where(eq(upload.id, id))
		.limit(1);
	if (found === undefined) return undefined;
	const { preview, mapping, problems, ...stored } = found.upload;
	return {
		...stored,
		partNumber: found.partNumber,
		uploadedByName: found.uploadedByName,
		/** The measurement set that came of it; staged ones don't count. */
		set: stored.state === 'accepted' ? found.set : null,
		preview: preview === null ? null : uploadPreview.parse(preview),
		confirmed: mapping === null ? null : confirmedMapping.parse(mapping),
		problems: problems === null ? null : uploadProblems.parse(problems)
	};
}
