import { eq, inArray } from 'drizzle-orm';
import { assessedRows, type AssessedRows } from '$lib/core/review/assessedRows';
import type { Database } from './database';
import { product, release, releaseAssessment } from './schema';

export interface ListedAssessment {
	readonly partNumber: string;
	readonly version: { readonly major: number; readonly minor: number };
	readonly at: string;
	readonly rows: AssessedRows;
}

/** What newer data makes of the releases in force, product by product. */
export async function listAssessments(db: Database): Promise<ListedAssessment[]> {
	const found = await db
		.select({
			partNumber: product.partNumber,
			major: release.major,
			minor: release.minor,
			at: releaseAssessment.at,
			rows: releaseAssessment.rows
		})
		.from(releaseAssessment)
		.innerJoin(release, eq(releaseAssessment.release, release.id))
		.innerJoin(product, eq(release.product, product.id))
		.where(inArray(release.state, ['scheduled', 'current']))
		.orderBy(product.partNumber, release.id);
	return found.map(({ partNumber, major, minor, at, rows }) => ({
		partNumber,
		version: { major, minor },
		at,
		rows: assessedRows.parse(rows)
	}));
}
