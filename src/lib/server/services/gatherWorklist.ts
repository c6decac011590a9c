import { versionText } from '$lib/core/datasheet/record';
import { jobName, worklistMessages as say } from '$lib/core/messages/worklist';
import { isPermitted } from '$lib/core/review/permissions';
import { mayDecide, mayPublish, type Actor } from '$lib/core/review/separation';
import type { Database } from '../db/database';
import { findJobProduct } from '../db/findJobProduct';
import { listAssessments } from '../db/listAssessments';
import { listFailedJobs } from '../db/listFailedJobs';
import { listOpenRevisions, type ListedOpenRevision } from '../db/listOpenRevisions';
import { listQuarantines } from '../db/listQuarantines';
import { listReturnedRevisions } from '../db/listReturnedRevisions';
import { listUploadsToMap } from '../db/listUploadsToMap';

/** One thing that waits, and where it is done. */
export interface WorklistItem {
	/** `null` for what belongs to no product. */
	readonly partNumber: string | null;
	readonly text: string;
	readonly note: string;
	/** Since when it waits: ISO instant. */
	readonly since: string;
	readonly href: string;
	readonly action: string;
}

export interface WorklistGroup {
	readonly title: string;
	/** At the right of the title: how many, of what. */
	readonly amount: string;
	readonly items: readonly WorklistItem[];
}

/** As many limits of a release are named in its line. */
const NAMED_LIMITS = 2;

/** Failures older than this are history. */
const FAILURES_FOR_DAYS = 7;

/**
 * What waits for a person, by their roles and by what they had a hand in: nobody is asked to verify
 * what they submitted, or to publish what they may not. Groups without anything are left out.
 *
 * @param at ISO instant
 */
export async function gatherWorklist(
	db: Database,
	person: Actor,
	at: string
): Promise<WorklistGroup[]> {
	const isProductEngineer = isPermitted(person.roles, 'verdict.give');
	const revisions = await listOpenRevisions(db);
	const groups = [
		...(isProductEngineer
			? [...(await published(db)), await quarantines(db), await uploads(db)]
			: []),
		await returned(db, person.id),
		toVerify(revisions, person),
		toPublish(revisions, person),
		await failures(db, person.id, at)
	];
	return groups.filter(({ items }) => items.length > 0);
}

/** How many things wait: the number in the rail. */
export const countWaiting = (groups: readonly WorklistGroup[]): number =>
	groups.reduce((sum, { items }) => sum + items.length, 0);

const productPath = (partNumber: string) => `/products/${encodeURIComponent(partNumber)}`;

/** Only what speaks against a limit waits; one that merely moved doesn't. */
async function published(db: Database): Promise<WorklistGroup[]> {
	const assessments = await listAssessments(db);
	const groupOf = (state: 'contradicted' | 'unsupported', title: string): WorklistGroup => {
		const found = assessments.flatMap(({ rows, ...of }) => {
			const concerned = rows.filter((row) => row.state === state);
			return concerned.length === 0 ? [] : [{ ...of, concerned }];
		});
		return {
			title,
			amount: say.limits(found.reduce((sum, { concerned }) => sum + concerned.length, 0)),
			items: found.map(({ partNumber, version, at, concerned }) => ({
				partNumber,
				text: say[state](versionText(version), concerned.length),
				note: concerned
					.slice(0, NAMED_LIMITS)
					.map(({ label, text }) => `${label}: ${text}`)
					.join(' '),
				since: at,
				href: `${productPath(partNumber)}/limits`,
				action: 'See the limits'
			}))
		};
	};
	return [
		groupOf('contradicted', 'Published limits contradicted'),
		groupOf('unsupported', 'Published limits no longer supported')
	];
}

async function quarantines(db: Database): Promise<WorklistGroup> {
	const found = await listQuarantines(db);
	return {
		title: 'Quarantined devices',
		amount: say.devices(found.reduce((sum, { devices }) => sum + devices, 0)),
		items: found.map(({ partNumber, set, devices, since }) => ({
			partNumber,
			text: say.quarantined(devices, set),
			note: say.quarantinedNote(),
			since,
			href: `${productPath(partNumber)}/measurements/sets/${set}`,
			action: 'Keep or exclude'
		}))
	};
}

async function uploads(db: Database): Promise<WorklistGroup> {
	const found = await listUploadsToMap(db);
	return {
		title: 'Files to map',
		amount: say.files(found.length),
		items: found.map(({ partNumber, upload, fileName, uploadedByName, since }) => ({
			partNumber,
			text: say.toMap(fileName),
			note: say.toMapNote(uploadedByName),
			since,
			href: `${productPath(partNumber)}/measurements/uploads/${upload}`,
			action: 'Map the columns'
		}))
	};
}

async function returned(db: Database, submitter: string): Promise<WorklistGroup> {
	const found = await listReturnedRevisions(db, submitter);
	return {
		title: 'Returned revisions',
		amount: say.revisions(found.length),
		items: found.map(({ partNumber, number, returnedByName, reason, comments, since }) => ({
			partNumber,
			text: say.returned(number, returnedByName, comments),
			note: reason,
			since,
			href: `${productPath(partNumber)}/datasheet`,
			action: 'Open the draft'
		}))
	};
}

const handsOf = ({ submittedBy, editors, approvedBy }: ListedOpenRevision) => ({
	submittedBy,
	editors,
	approvedBy
});

function toVerify(revisions: readonly ListedOpenRevision[], person: Actor): WorklistGroup {
	const found = revisions.filter(
		(row) => row.state === 'inReview' && mayDecide(person, handsOf(row)).permitted
	);
	return {
		title: 'Revisions to verify',
		amount: say.revisions(found.length),
		items: found.map((row) => ({
			partNumber: row.partNumber,
			text: say.toVerify(row.number, row.submittedByName),
			note: say.toVerifyNote(row.ticked, row.flagged, row.ticked + row.flagged + row.open),
			since: row.submittedAt,
			href: `${productPath(row.partNumber)}/revisions/${row.number}`,
			action: 'Verify the rows'
		}))
	};
}

function toPublish(revisions: readonly ListedOpenRevision[], person: Actor): WorklistGroup {
	const found = revisions.filter(
		(row) => row.state === 'approved' && mayPublish(person, handsOf(row)).permitted
	);
	return {
		title: 'Approved, to publish',
		amount: say.revisions(found.length),
		items: found.map((row) => ({
			partNumber: row.partNumber,
			text: say.toPublish(row.number, row.approvedByName ?? ''),
			note: say.toPublishNote(row.submittedByName),
			since: row.approvedAt ?? row.submittedAt,
			href: `${productPath(row.partNumber)}/releases`,
			action: 'Publish'
		}))
	};
}

/** Where a person sees what became of a job of this kind. */
const PLACES: Readonly<Record<string, string>> = {
	'render-proof': 'datasheet',
	'verify-evidence': 'datasheet',
	'publish-release': 'releases'
};

async function failures(db: Database, person: string, at: string): Promise<WorklistGroup> {
	const since = new Date(Date.parse(at) - FAILURES_FOR_DAYS * 86_400_000).toISOString();
	const found = await listFailedJobs(db, person, since);
	const items: WorklistItem[] = [];
	for (const { kind, payload, error, createdAt, endedAt } of found) {
		const partNumber = await findJobProduct(db, payload);
		items.push({
			partNumber: partNumber ?? null,
			text: say.failed(jobName(kind)),
			note: error ?? '',
			since: endedAt ?? createdAt,
			href:
				partNumber === undefined
					? '/products'
					: `${productPath(partNumber)}/${PLACES[kind] ?? 'measurements'}`,
			action: 'See what to do'
		});
	}
	return { title: 'Work that failed', amount: say.jobs(found.length), items };
}

/** Since when the oldest of all waits; `undefined` when nothing does. */
export function oldestSince(groups: readonly WorklistGroup[]): string | undefined {
	return groups
		.flatMap(({ items }) => items.map(({ since }) => since))
		.toSorted()
		.at(0);
}
