import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listRevisions } from '$lib/server/db/listRevisions';
import { listVerificationRows } from '$lib/server/db/listVerificationRows';
import { decideRevision } from '$lib/server/services/decideRevision';
import { publishRelease } from '$lib/server/services/publishRelease';
import { submitRevision } from '$lib/server/services/submitRevision';
import { tickLowRisk, verifyRow } from '$lib/server/services/verifyRow';
import type { Stores } from '$lib/server/work/stores';
import type { WorkOff } from './measurements';
import { must } from './must';
import type { DemoPeople } from './people';

/** Submits a product's draft and answers the revision's id; nothing where one is there already. */
async function submit(
	stores: Stores,
	partNumber: string,
	people: DemoPeople,
	workOff: WorkOff
): Promise<number | undefined> {
	const product = await findProductByPartNumber(stores.db, partNumber);
	if (product === undefined || (await listRevisions(stores.db, product.id)).length > 0) {
		return undefined;
	}
	const { revision } = must(
		await submitRevision(stores, { partNumber, by: people.product }),
		'submitted'
	);
	await workOff();
	return revision.id;
}

/** Carries the tuning diode through verification and approval to its first release. */
export async function seedRelease(
	stores: Stores,
	partNumber: string,
	people: DemoPeople,
	workOff: WorkOff
): Promise<void> {
	const revision = await submit(stores, partNumber, people, workOff);
	if (revision === undefined) return;
	const by = people.applications;
	must(await tickLowRisk(stores, { revision, by }), 'verified');
	for (const { row, state } of await listVerificationRows(stores.db, revision)) {
		if (state === 'ticked') continue;
		must(await verifyRow(stores, { revision, row, verdict: 'tick', by }), 'verified');
	}
	must(await decideRevision(stores, { revision, decision: 'approve', by }), 'approved');
	must(
		await publishRelease(stores, {
			revision,
			effectiveFrom: new Date().toISOString().slice(0, 10),
			by: people.marketing
		}),
		'queued'
	);
	await workOff();
}

/** Leaves the rectifier's first revision with the applications engineer, half verified. */
export async function seedOpenRevision(
	stores: Stores,
	partNumber: string,
	people: DemoPeople,
	workOff: WorkOff
): Promise<void> {
	const revision = await submit(stores, partNumber, people, workOff);
	if (revision === undefined) return;
	const rows = await listVerificationRows(stores.db, revision);
	const low = rows.filter(({ evidence }) => evidence.risk === 'low');
	for (const { row } of low.slice(0, Math.ceil(low.length / 2))) {
		must(
			await verifyRow(stores, {
				revision,
				row,
				verdict: 'tick',
				by: people.applications
			}),
			'verified'
		);
	}
}
