import { and, eq } from 'drizzle-orm';
import type { JointDistribution } from '$lib/core/distributions/jointDistribution';
import { unpackJoint } from '$lib/core/distributions/packJoint';
import type { Database } from './database';
import { jointDistribution } from './schema';

/**
 * How a characteristic varies together over the biases of one temperature and frequency, or
 * `undefined` when fewer than two devices have all of them.
 */
export async function findJointDistribution(
	db: Database,
	at: {
		readonly product: number;
		readonly basisHash: string;
		readonly characteristic: string;
		/** `conditionKey` of core, without a bias. */
		readonly conditionKey: string;
	}
): Promise<JointDistribution | undefined> {
	const [found] = await db
		.select({ joint: jointDistribution.joint })
		.from(jointDistribution)
		.where(
			and(
				eq(jointDistribution.product, at.product),
				eq(jointDistribution.characteristic, at.characteristic),
				eq(jointDistribution.conditionKey, at.conditionKey),
				eq(jointDistribution.basisHash, at.basisHash)
			)
		)
		.limit(1);
	return found && unpackJoint(found.joint);
}
