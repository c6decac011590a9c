import { isPermitted, type Permission, type Role } from './permissions';

export interface Place {
	readonly href: string;
	readonly label: string;
}

/** The rail, in order: each place shows to those who may read there. */
const PLACES: readonly (Place & { readonly permission: Permission })[] = [
	{ href: '/worklist', label: 'Worklist', permission: 'worklist.read' },
	{ href: '/products', label: 'Products', permission: 'product.read' },
	{ href: '/templates', label: 'Templates', permission: 'template.read' },
	{ href: '/library', label: 'Library', permission: 'release.read' },
	{ href: '/administration/people', label: 'Administration', permission: 'people.manage' }
];

export function placesFor(roles: readonly Role[]): Place[] {
	return PLACES.filter(({ permission }) => isPermitted(roles, permission)).map(
		({ href, label }) => ({ href, label })
	);
}
