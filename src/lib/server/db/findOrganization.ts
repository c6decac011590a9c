import { desc } from 'drizzle-orm';
import { DEFAULT_ORGANIZATION, organization, type Organization } from '$lib/core/organization';
import type { Database } from './database';
import { organizationVersion } from './schema';

/** What the organization decided last; the defaults while it has decided nothing. */
export async function findOrganization(db: Database): Promise<Organization> {
	const [newest] = await db
		.select({ json: organizationVersion.json })
		.from(organizationVersion)
		.orderBy(desc(organizationVersion.number))
		.limit(1);
	return newest === undefined ? DEFAULT_ORGANIZATION : organization.parse(newest.json);
}
