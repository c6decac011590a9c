import { and, asc, eq, inArray, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/sqlite-core';
import { OPEN_REVISION_STATES } from '$lib/core/review/states';
import type { Database } from './database';
import { decision, person, product, revision, verificationRow } from './schema';

export type ListedOpenRevision = Awaited<ReturnType<typeof listOpenRevisions>>[number];

const rowsIn = (state: 'ticked' | 'flagged' | 'open') =>
	sql<number>`coalesce(sum(${verificationRow.state} = ${state}), 0)`;

/** Revisions in review or approved, oldest first, with who did what and how many rows are verified. */
export function listOpenRevisions(db: Database) {
	const approver = alias(person, 'approver');
	return db
		.select({
			partNumber: product.partNumber,
			number: revision.number,
			state: revision.state,
			submittedBy: revision.submittedBy,
			submittedByName: person.name,
			submittedAt: revision.submittedAt,
			editors: revision.editors,
			approvedBy: decision.by,
			approvedByName: approver.name,
			approvedAt: decision.at,
			ticked: rowsIn('ticked'),
			flagged: rowsIn('flagged'),
			open: rowsIn('open')
		})
		.from(revision)
		.innerJoin(product, eq(revision.product, product.id))
		.innerJoin(person, eq(revision.submittedBy, person.id))
		.leftJoin(decision, and(eq(decision.revision, revision.id), eq(decision.event, 'approve')))
		.leftJoin(approver, eq(decision.by, approver.id))
		.leftJoin(verificationRow, eq(verificationRow.revision, revision.id))
		.where(inArray(revision.state, OPEN_REVISION_STATES))
		.groupBy(revision.id)
		.orderBy(asc(revision.submittedAt));
}
