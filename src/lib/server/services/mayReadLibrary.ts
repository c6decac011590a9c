import { isPermitted } from '$lib/core/review/permissions';
import type { SignedIn } from '../auth/signedIn';
import type { Database } from '../db/database';
import { findOrganization } from '../db/findOrganization';

export interface LibraryAccess {
	readonly isAllowed: boolean;
	/** Whether it is there for everyone: what is handed out may be kept by shared caches. */
	readonly isPublic: boolean;
	/** Whether the reader is signed in and may read releases, withdrawn ones included. */
	readonly isReader: boolean;
}

/** Who may read published datasheets: everyone when the organization says so, else who signed in. */
export async function mayReadLibrary(
	db: Database,
	person: SignedIn | null
): Promise<LibraryAccess> {
	const { libraryIsPublic } = await findOrganization(db);
	const isReader = person !== null && isPermitted(person.roles, 'release.read');
	return { isAllowed: libraryIsPublic || isReader, isPublic: libraryIsPublic, isReader };
}
