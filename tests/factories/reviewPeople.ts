import type { Role } from '$lib/core/review/permissions';
import type { Connection } from '$lib/server/db/database';
import { person, personRole } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { ENGINEER } from './acceptedSet';

/** The people of a review, by id. Lena holds every role: a deputy. */
export const PEOPLE = {
	[ENGINEER]: ['product_engineer'],
	tomas: ['applications_engineer'],
	noor: ['marketing'],
	per: ['administrator'],
	lena: ['product_engineer', 'applications_engineer', 'marketing', 'administrator', 'reader']
} as const satisfies Record<string, readonly Role[]>;

/** Inserts the people of a review with their roles. */
export async function insertReviewPeople(db: Connection): Promise<void> {
	await write(db, async (tx) => {
		for (const [id, roles] of Object.entries(PEOPLE)) {
			await tx
				.insert(person)
				.values({
					id,
					email: `${id}@larkmoor.test`,
					name: id,
					passwordHash: '-',
					createdAt: '2026-01-05T08:00:00.000Z'
				})
				.onConflictDoNothing();
			for (const role of roles)
				await tx.insert(personRole).values({ person: id, role }).onConflictDoNothing();
		}
	});
}
