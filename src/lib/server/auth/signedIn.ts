import type { Role } from '$lib/core/review/permissions';

/** Who is asking. */
export interface SignedIn {
	readonly id: string;
	readonly name: string;
	readonly email: string;
	readonly roles: readonly Role[];
}
