import { desc } from 'drizzle-orm';
import { DEFAULT_ORGANIZATION, organization, type Organization } from '$lib/core/organization';
import { appendAudit } from '../db/appendAudit';
import { organizationVersion } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { sha256 } from './sha256';

/**
 * Writes the organization's next version where it differs from the newest one. Without settings it
 * only makes sure that there is a version to refer to.
 */
export async function ensureOrganization(
	{ db }: Pick<Stores, 'db'>,
	wanted: { readonly settings?: Partial<Organization>; readonly by: string | null }
): Promise<Organization> {
	const at = new Date().toISOString();
	return write(db, async (tx) => {
		const [newest] = await tx
			.select()
			.from(organizationVersion)
			.orderBy(desc(organizationVersion.number))
			.limit(1);
		const held = newest === undefined ? undefined : organization.parse(newest.json);
		const next = organization.parse({ ...(held ?? DEFAULT_ORGANIZATION), ...wanted.settings });
		const hash = sha256(JSON.stringify(next));
		if (newest?.hash === hash) return next;

		const number = (newest?.number ?? 0) + 1;
		await tx
			.insert(organizationVersion)
			.values({ number, json: next, hash, createdAt: at, createdBy: wanted.by });
		await appendAudit(tx, {
			action: 'organization.change',
			subject: `organization version ${number}`,
			by: wanted.by,
			details: { name: next.name, libraryIsPublic: next.libraryIsPublic, paper: next.paper }
		});
		return next;
	});
}
