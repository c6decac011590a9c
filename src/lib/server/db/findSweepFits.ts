import { and, eq } from 'drizzle-orm';
import { sweepFits, type SweepFits } from '$lib/core/distributions/sweepFits';
import type { Database } from './database';
import { sweepFit } from './schema';

/** The fitted laws of a product's devices at one temperature and frequency, or `undefined`. */
export async function findSweepFits(
	db: Database,
	at: {
		readonly product: number;
		readonly basisHash: string;
		/** `conditionKey` of core, without a bias. */
		readonly conditionKey: string;
	}
): Promise<SweepFits | undefined> {
	const [found] = await db
		.select({ fits: sweepFit.fits })
		.from(sweepFit)
		.where(
			and(
				eq(sweepFit.product, at.product),
				eq(sweepFit.conditionKey, at.conditionKey),
				eq(sweepFit.basisHash, at.basisHash)
			)
		)
		.limit(1);
	return found && sweepFits.parse(found.fits);
}
