import { desc, eq } from 'drizzle-orm';
import { limitPolicy, type LimitPolicy } from '$lib/core/limits/policy';
import { policyText } from '$lib/core/limits/policyText';
import { appendAudit } from '../db/appendAudit';
import { policyVersion } from '../db/schema';
import { write } from '../db/write';
import type { Stores } from '../work/stores';
import { sha256 } from './sha256';

/** What a fresh installation offers, its default first; an organization adds its own versions. */
export const DEFAULT_POLICIES: readonly { readonly policy: string; readonly rules: LimitPolicy }[] =
	[
		{
			policy: 'future-lots-99-95',
			rules: {
				name: 'Future lots 99/95',
				method: 'lots',
				content: 0.99,
				confidence: 0.95,
				tails: 'each',
				span: 'each-bias',
				minimumLots: 3,
				minimumDevices: 30,
				drift: 0,
				uncertaintyTreatment: 'outwards',
				resolution: { significantFigures: 3 }
			}
		},
		{
			policy: 'population-99-95',
			rules: {
				name: 'Population 99/95',
				method: 'normal',
				content: 0.99,
				confidence: 0.95,
				tails: 'each',
				span: 'each-bias',
				minimumLots: 3,
				minimumDevices: 30,
				drift: 0,
				uncertaintyTreatment: 'outwards',
				resolution: { significantFigures: 3 }
			}
		},
		{
			policy: 'any-shape-99-95',
			rules: {
				name: 'Any shape 99/95',
				method: 'order',
				content: 0.99,
				confidence: 0.95,
				tails: 'each',
				span: 'each-bias',
				minimumLots: 3,
				minimumDevices: 30,
				drift: 0,
				uncertaintyTreatment: 'outwards',
				resolution: { significantFigures: 3 }
			}
		},
		{
			policy: 'house-four-sigma',
			rules: {
				name: 'House four sigma',
				method: 'sigma',
				content: 0.99,
				confidence: 0.95,
				tails: 'each',
				span: 'each-bias',
				k: 4,
				minimumLots: 1,
				minimumDevices: 30,
				drift: 0,
				uncertaintyTreatment: 'outwards',
				resolution: { significantFigures: 3 }
			}
		}
	];

/**
 * Makes sure that the default policies exist. A policy that has a version is left alone: from then
 * on it belongs to the organization.
 */
export async function ensurePolicies({ db }: Pick<Stores, 'db'>): Promise<void> {
	const at = new Date().toISOString();
	await write(db, async (tx) => {
		for (const { policy, rules } of DEFAULT_POLICIES) {
			const [newest] = await tx
				.select({ id: policyVersion.id })
				.from(policyVersion)
				.where(eq(policyVersion.policy, policy))
				.orderBy(desc(policyVersion.number))
				.limit(1);
			if (newest !== undefined) continue;

			const json = limitPolicy.parse(rules);
			const hash = sha256(policyText(json));
			await tx
				.insert(policyVersion)
				.values({ policy, number: 1, json, hash, createdAt: at, createdBy: null });
			await appendAudit(tx, {
				action: 'policy.create',
				subject: `${rules.name} version 1`,
				by: null,
				details: { policy, number: 1, hash }
			});
		}
	});
}
