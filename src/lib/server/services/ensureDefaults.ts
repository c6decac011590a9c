import type { Stores } from '../work/stores';
import { ensureOrganization } from './ensureOrganization';
import { ensurePolicies } from './ensurePolicies';
import { ensureTemplates } from './ensureTemplates';

/** What every installation starts with; what is there already stays as it is. */
export async function ensureDefaults(stores: Pick<Stores, 'db'>): Promise<void> {
	await ensureOrganization(stores, { by: null });
	await ensurePolicies(stores);
	await ensureTemplates(stores);
}
