import { expect, it } from 'vitest';
import { PERMISSIONS, ROLES, isPermitted } from './permissions';
import type { Permission, Role } from './permissions';

const mayDo = (role: Role): string[] =>
	Object.keys(PERMISSIONS).filter((permission) => isPermitted([role], permission as Permission));

// The roles of design/product.md, written out apart from the table.
it('lets a reader read what is published and nothing more', () => {
	expect(mayDo('reader').toSorted()).toEqual(['account.manage', 'release.read', 'worklist.read']);
});

it('gives an administrator no right to approve, verify, publish or edit', () => {
	const working: Permission[] = [
		'revision.approve',
		'revision.verify',
		'release.publish',
		'revision.submit',
		'draft.edit',
		'draft.write',
		'product.edit',
		'measurement.upload',
		'verdict.give'
	];
	for (const permission of working) expect(isPermitted(['administrator'], permission)).toBe(false);
	expect(isPermitted(['administrator'], 'people.manage')).toBe(true);
	expect(isPermitted(['administrator'], 'audit.read')).toBe(true);
});

it.each<[Permission, Role]>([
	['product.edit', 'product_engineer'],
	['measurement.upload', 'product_engineer'],
	['verdict.give', 'product_engineer'],
	['draft.edit', 'product_engineer'],
	['revision.submit', 'product_engineer'],
	['revision.verify', 'applications_engineer'],
	['revision.approve', 'applications_engineer'],
	['release.publish', 'marketing'],
	['people.manage', 'administrator'],
	['audit.read', 'administrator']
])('gives %s to the %s alone', (permission, only) => {
	expect(ROLES.filter((role) => isPermitted([role], permission))).toEqual([only]);
});

it('lets marketing and the product engineer write text, and nobody else', () => {
	expect(ROLES.filter((role) => isPermitted([role], 'draft.write'))).toEqual([
		'product_engineer',
		'marketing'
	]);
});

it('adds the rights of several roles up, and gives none without a role', () => {
	expect(isPermitted(['reader', 'marketing'], 'release.publish')).toBe(true);
	expect(isPermitted(['marketing', 'reader'], 'revision.approve')).toBe(false);
	expect(isPermitted([], 'worklist.read')).toBe(false);
});
