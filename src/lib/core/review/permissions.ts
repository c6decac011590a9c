import { z } from 'zod';

export const ROLES = [
	'product_engineer',
	'applications_engineer',
	'marketing',
	'administrator',
	'reader'
] as const;

export const role = z.enum(ROLES);
export type Role = z.infer<typeof role>;

/** How a role is written for people. */
export const ROLE_NAMES = {
	product_engineer: 'product engineer',
	applications_engineer: 'applications engineer',
	marketing: 'marketing',
	administrator: 'administrator',
	reader: 'reader'
} as const satisfies Record<Role, string>;

const EVERYBODY = ROLES;
const WORKING = [
	'product_engineer',
	'applications_engineer',
	'marketing',
	'administrator'
] as const;
const PRODUCT = ['product_engineer'] as const;
const APPLICATIONS = ['applications_engineer'] as const;
const MARKETING = ['marketing'] as const;
const ADMINISTRATION = ['administrator'] as const;

/**
 * Who may do what: the one table. Duties are separated per revision as well (see `separation.ts`),
 * and being administrator gives no right to approve or publish.
 */
export const PERMISSIONS = {
	'worklist.read': EVERYBODY,
	'account.manage': EVERYBODY,
	'release.read': EVERYBODY,
	'product.read': WORKING,
	'product.edit': PRODUCT,
	'measurement.read': WORKING,
	'measurement.upload': PRODUCT,
	'verdict.give': PRODUCT,
	'limit.read': WORKING,
	'limit.decide': PRODUCT,
	'policy.read': WORKING,
	'policy.manage': ADMINISTRATION,
	'template.read': WORKING,
	'draft.read': WORKING,
	'draft.edit': PRODUCT,
	'draft.write': ['product_engineer', 'marketing'],
	'revision.submit': PRODUCT,
	'revision.read': WORKING,
	'revision.comment': WORKING,
	'revision.verify': APPLICATIONS,
	'revision.approve': APPLICATIONS,
	'release.publish': MARKETING,
	'people.manage': ADMINISTRATION,
	'audit.read': ADMINISTRATION
} as const satisfies Record<string, readonly Role[]>;

export type Permission = keyof typeof PERMISSIONS;

/** Whether somebody who holds these roles may do this. */
export function isPermitted(roles: readonly Role[], permission: Permission): boolean {
	const allowed: readonly Role[] = PERMISSIONS[permission];
	return roles.some((held) => allowed.includes(held));
}
