import { and, eq, inArray } from 'drizzle-orm';
import { z } from 'zod';
import { conditionKey as conditionKeyOf } from '$lib/core/characteristics/condition';
import { documentRows, type DocumentRow } from '$lib/core/datasheet/documentRows';
import { readDocument } from '$lib/core/datasheet/readDocument';
import { computeLimitRow } from '$lib/core/limits/computeLimitRow';
import { assessPublished } from '$lib/core/limits/evidence/publishedLimit';
import type { LimitRow } from '$lib/core/limits/limit';
import type { AssessedRows } from '$lib/core/review/assessedRows';
import type { Connection, Database } from '../db/database';
import { findDistribution } from '../db/findDistribution';
import { findJointDistribution } from '../db/findJointDistribution';
import { findLimitsByTrace } from '../db/findLimitByTrace';
import { findPolicyVersion, type StoredPolicy } from '../db/findPolicies';
import { product, release, releaseAssessment, revision } from '../db/schema';
import { write } from '../db/write';
import { enqueue } from '../work/enqueue';
import type { JobHandler } from '../work/jobHandler';
import { computedWidening } from './curveWidening';

export const assessReleasesPayload = z.object({ product: z.number().int() });

const IN_FORCE = inArray(release.state, ['scheduled', 'current']);

/** Has the published limits of a product judged by its newest distributions, where it has some. */
export async function enqueueAssessment(
	tx: Database,
	productId: number,
	basisHash: string
): Promise<void> {
	const [published] = await tx
		.select({ id: release.id })
		.from(release)
		.where(and(eq(release.product, productId), IN_FORCE))
		.limit(1);
	if (published === undefined) return;
	await enqueue(tx, {
		kind: 'assess-releases',
		payload: { product: productId },
		dedupeKey: `assess-releases:${productId}:${basisHash}`,
		by: null
	});
}

/**
 * releases in force → the stored limit behind each printed row → the same policy on the data of
 * today → what no longer holds, kept beside the release for the worklist.
 */
export const assessReleases: JobHandler = async ({ db }, payload) => {
	const { product: productId } = assessReleasesPayload.parse(payload);
	const [owner] = await db.select().from(product).where(eq(product.id, productId)).limit(1);
	const basisHash = owner?.basisHash ?? null;
	if (basisHash === null) return { assessed: 0 };

	const published = await db
		.select({ id: release.id, document: revision.document })
		.from(release)
		.innerJoin(revision, eq(release.revision, revision.id))
		.where(and(eq(release.product, productId), inArray(release.state, ['scheduled', 'current'])));
	for (const { id, document } of published) {
		const rows = await assessRows(db, documentRows(readDocument(document)), {
			product: productId,
			basisHash
		});
		const values = { basisHash, rows, at: new Date().toISOString() };
		await write(db, (tx) =>
			tx
				.insert(releaseAssessment)
				.values({ release: id, ...values })
				.onConflictDoUpdate({ target: releaseAssessment.release, set: values })
		);
	}
	return { assessed: published.length };
};

interface Today {
	readonly product: number;
	readonly basisHash: string;
}

async function assessRows(
	db: Connection,
	rows: readonly DocumentRow[],
	today: Today
): Promise<AssessedRows> {
	const traces = rows.flatMap(({ row }) => row.trace ?? []);
	const stored = await findLimitsByTrace(db, traces);
	const policies = new Map<number, StoredPolicy | undefined>();
	const found: AssessedRows = [];
	for (const entry of rows) {
		const limit = entry.row.trace === null ? undefined : stored.get(entry.row.trace);
		if (entry.kind === 'rating' || limit === undefined) continue;
		if (!policies.has(limit.policyVersion)) {
			policies.set(limit.policyVersion, await findPolicyVersion(db, limit.policyVersion));
		}
		const policy = policies.get(limit.policyVersion);
		if (policy === undefined) continue;
		const { state, text } = await assessRow(db, entry, { limit, policy, today });
		if (state !== 'holds') found.push({ row: entry.row.id, label: entry.label, state, text });
	}
	return found;
}

type LimitEntry = Exclude<DocumentRow, { kind: 'rating' }>;

async function assessRow(
	db: Connection,
	{ row }: LimitEntry,
	{ limit, policy, today }: { limit: LimitRow; policy: StoredPolicy; today: Today }
) {
	const { characteristic, conditionKey, condition, unit, unitScale } = limit;
	const distribution = await findDistribution(db, { ...today, characteristic, conditionKey });
	if (distribution === undefined) return { state: 'holds', text: '' } as const;
	const basis = row.basis ?? 'typical';
	const sides = (['minimum', 'maximum'] as const).filter((side) => limit[side] !== null);
	const joint =
		policy.rules.span === 'whole-curve'
			? await findJointDistribution(db, {
					...today,
					characteristic,
					conditionKey: conditionKeyOf({ ...condition, reverseVoltage: undefined })
				})
			: undefined;
	const recomputed = computeLimitRow(distribution, policy.rules, {
		policyVersion: policy.id,
		condition,
		unit,
		unitScale,
		inputHash: '',
		sides,
		declaredBasis: basis,
		widening: joint && (await computedWidening(db, joint, policy.rules, sides))
	});
	return assessPublished(
		{
			minimum: row.minimum?.value ?? null,
			maximum: row.maximum?.value ?? null,
			basis,
			unit,
			unitScale
		},
		{ distribution, recomputed, rules: policy.rules }
	);
}
