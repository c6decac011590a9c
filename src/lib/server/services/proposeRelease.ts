import type { Change } from '$lib/core/datasheet/change';
import { changedRows, compareDocuments } from '$lib/core/datasheet/compareDocuments';
import { nextVersion, type Version } from '$lib/core/datasheet/nextVersion';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { versionText, type PublicationRecord } from '$lib/core/datasheet/record';
import { summarizeChanges } from '$lib/core/datasheet/summarizeChanges';
import type { Database } from '../db/database';
import { findPreviousRelease } from '../db/findPreviousRelease';
import type { FoundRevision } from '../db/findRevision';
import { listReleases } from '../db/listReleases';

export interface ReleaseProposal {
	readonly version: Version;
	/** The release before, or `null` for the first. */
	readonly previous: {
		readonly id: number;
		readonly version: Version;
		readonly date: string;
	} | null;
	/** What differs from it; empty for the first. */
	readonly changes: readonly Change[];
	readonly changedRows: readonly string[];
	/** A line for the revision history. */
	readonly summary: string;
	/** The history so far, newest first. */
	readonly history: PublicationRecord['history'];
}

/** What publishing a revision would make of it: version by the rule, and what changed. */
export async function proposeRelease(
	db: Database,
	revision: Pick<FoundRevision, 'product' | 'document'>
): Promise<ReleaseProposal> {
	const document = readDocument(revision.document);
	const releases = await listReleases(db, revision.product);
	const before = await findPreviousRelease(db, revision.product);
	const changes = before ? compareDocuments(before.document, document) : [];
	return {
		version: nextVersion(releases, document.status, changes),
		previous: before
			? {
					id: before.id,
					version: { major: before.major, minor: before.minor },
					date: before.effectiveFrom
				}
			: null,
		changes,
		changedRows: changedRows(changes),
		summary: before ? summarizeChanges(changes) : 'First release.',
		history: releases.map(({ major, minor, state, effectiveFrom, record }) => ({
			version: { major, minor },
			date: effectiveFrom,
			changes: `${ownLine(record, { major, minor })}${state === 'withdrawn' ? ' Withdrawn.' : ''}`
		}))
	};
}

/** What a record says of its own version. */
function ownLine(record: PublicationRecord, version: Version): string {
	return (
		record.history.find((line) => versionText(line.version) === versionText(version))?.changes ?? ''
	);
}
