import type { Role } from '$lib/core/review/permissions';
import { findPersonByEmail } from '$lib/server/db/findSignedIn';
import { addPerson } from '$lib/server/services/addPerson';
import type { Stores } from '$lib/server/work/stores';

/** All demo people share it; the demo's sign-in page lets them in without. */
export const DEMO_PASSWORD = 'larkmoor-demo';

const PEOPLE = {
	administrator: { name: 'Per Aalto', email: 'admin@larkmoor.test', roles: ['administrator'] },
	product: { name: 'Ida Sandvik', email: 'product@larkmoor.test', roles: ['product_engineer'] },
	applications: {
		name: 'Tomas Rehak',
		email: 'applications@larkmoor.test',
		roles: ['applications_engineer']
	},
	marketing: { name: 'Noor Lindqvist', email: 'marketing@larkmoor.test', roles: ['marketing'] },
	reader: { name: 'Mira Okafor', email: 'reader@larkmoor.test', roles: ['reader'] }
} as const satisfies Record<
	string,
	{ readonly name: string; readonly email: string; readonly roles: readonly Role[] }
>;

/** The ids of the demo's people, by what they do. */
export type DemoPeople = Readonly<Record<keyof typeof PEOPLE, string>>;

export const DEMO_EMAILS = Object.values(PEOPLE).map(({ email, name }) => ({ email, name }));

/** Adds the demo's people: the administrator first, who then adds the others. */
export async function seedPeople(stores: Stores): Promise<DemoPeople> {
	const administrator = await ensurePerson(stores, PEOPLE.administrator, null);
	return {
		administrator,
		product: await ensurePerson(stores, PEOPLE.product, administrator),
		applications: await ensurePerson(stores, PEOPLE.applications, administrator),
		marketing: await ensurePerson(stores, PEOPLE.marketing, administrator),
		reader: await ensurePerson(stores, PEOPLE.reader, administrator)
	};
}

async function ensurePerson(
	stores: Stores,
	{ name, email, roles }: (typeof PEOPLE)[keyof typeof PEOPLE],
	by: string | null
): Promise<string> {
	const found = await findPersonByEmail(stores.db, email);
	if (found !== undefined) return found.id;
	const outcome = await addPerson(stores, { name, email, roles, password: DEMO_PASSWORD, by });
	if (outcome.status === 'refused') throw new Error(outcome.message);
	return outcome.person;
}
