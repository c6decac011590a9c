import type { Permission } from '$lib/core/review/permissions';

/**
 * Who an entry is for: a permission; `public` for everybody; `library` for everybody when the
 * organization's library is public, and otherwise for those who may read releases.
 */
export type Access = Permission | 'public' | 'library';

/**
 * Every load, named action and endpoint method of the application, with the permission it asks for.
 * A route that is added is added here: one that is missing fails the test, and so does one that is
 * listed and does not exist. The keys are
 *
 *   `<route> load`, `<route> action <name>`, `<route> <METHOD>`, `<folder> layout load`
 *
 * where a route is written without its groups, a layout's folder with them.
 */
export const ACCESS: Readonly<Record<string, Access>> = {
	'/ load': 'worklist.read',

	'/healthz GET': 'public',
	'/readyz GET': 'public',

	'/sign-in load': 'public',
	'/sign-in action signIn': 'public',
	'/sign-in action comeIn': 'public',
	'/sign-out POST': 'account.manage',

	'/(app) layout load': 'worklist.read',
	'/account load': 'account.manage',
	'/account action createToken': 'account.manage',
	'/account action revokeToken': 'account.manage',
	'/account action signOutEverywhere': 'account.manage',
	'/worklist load': 'worklist.read',

	'/dies load': 'product.read',
	'/dies/[die] load': 'product.edit',
	'/dies/[die] action save': 'product.edit',
	'/dies/[die] action fill': 'product.edit',
	'/dies/new load': 'product.edit',
	'/dies/new action save': 'product.edit',
	'/dies/new action fill': 'product.edit',

	'/products load': 'product.read',
	'/(app)/products/[partNumber] layout load': 'product.read',
	'/products/[partNumber] load': 'product.read',
	'/products/[partNumber]/datasheet load': 'draft.read',
	'/products/[partNumber]/datasheet action open': 'draft.edit',
	'/products/[partNumber]/datasheet action settings': 'draft.edit',
	'/products/[partNumber]/datasheet action bindEverything': 'draft.edit',
	'/products/[partNumber]/datasheet action bind': 'draft.edit',
	'/products/[partNumber]/datasheet action keep': 'draft.edit',
	'/products/[partNumber]/datasheet action strike': 'draft.edit',
	'/products/[partNumber]/datasheet action clear': 'draft.edit',
	'/products/[partNumber]/datasheet action rate': 'draft.edit',
	'/products/[partNumber]/datasheet action write': 'draft.write',
	'/products/[partNumber]/datasheet action submit': 'revision.submit',
	'/products/[partNumber]/datasheet/proof.pdf GET': 'draft.read',
	'/products/[partNumber]/edit load': 'product.edit',
	'/products/[partNumber]/edit action save': 'product.edit',
	'/products/[partNumber]/edit action addRow': 'product.edit',
	'/products/[partNumber]/edit action removeRow': 'product.edit',
	'/products/[partNumber]/coverage load': 'limit.read',
	'/products/[partNumber]/characteristics load': 'limit.read',
	'/products/[partNumber]/characteristics/table.csv GET': 'limit.read',
	'/products/[partNumber]/cv load': 'limit.read',
	'/products/[partNumber]/cv/band.json GET': 'limit.read',
	'/products/[partNumber]/cv/model.lib GET': 'limit.read',
	'/products/[partNumber]/cv/sweeps.json GET': 'measurement.read',
	'/products/[partNumber]/cv/table.csv GET': 'limit.read',
	'/products/[partNumber]/limits load': 'limit.read',
	'/products/[partNumber]/limits action decide': 'limit.decide',
	'/products/[partNumber]/limits action takeBack': 'limit.decide',
	'/products/[partNumber]/limits/test-limits.csv GET': 'limit.read',
	'/products/[partNumber]/limits/table.csv GET': 'limit.read',
	'/products/[partNumber]/measurements load': 'measurement.read',
	'/products/[partNumber]/measurements action upload': 'measurement.upload',
	'/products/[partNumber]/measurements/sets/[set=id] load': 'measurement.read',
	'/products/[partNumber]/measurements/sets/[set=id] action verdict': 'verdict.give',
	'/products/[partNumber]/measurements/sets/[set=id]/readings.csv GET': 'measurement.read',
	'/products/[partNumber]/measurements/uploads/[upload=id] load': 'measurement.read',
	'/products/[partNumber]/measurements/uploads/[upload=id] action map': 'measurement.upload',
	'/products/[partNumber]/releases load': 'release.read',
	'/products/[partNumber]/releases action withdrawal': 'release.publish',
	'/products/[partNumber]/releases/publish load': 'release.publish',
	'/products/[partNumber]/releases/publish action default': 'release.publish',
	'/products/[partNumber]/revisions/[number] load': 'revision.read',
	'/products/[partNumber]/revisions/[number] action verify': 'revision.verify',
	'/products/[partNumber]/revisions/[number] action tickLowRisk': 'revision.verify',
	'/products/[partNumber]/revisions/[number] action comment': 'revision.comment',
	'/products/[partNumber]/revisions/[number] action decide': 'revision.approve',
	'/products/[partNumber]/revisions/[number]/sheet.csv GET': 'revision.read',
	'/products/new load': 'product.edit',
	'/products/new action save': 'product.edit',
	'/products/new action addRow': 'product.edit',
	'/products/new action removeRow': 'product.edit',
	'/products/table.csv GET': 'product.read',

	'/(library) layout load': 'library',
	'/library load': 'library',
	'/library/[partNumber] load': 'library',

	'/(app)/administration layout load': 'people.manage',
	'/administration/audit load': 'audit.read',
	'/administration/people load': 'people.manage',
	'/administration/people action add': 'people.manage',
	'/administration/people/[person] load': 'people.manage',
	'/administration/people/[person] action change': 'people.manage',
	'/administration/policies load': 'policy.manage',
	'/administration/policies/[policy] load': 'policy.manage',
	'/administration/policies/[policy] action save': 'policy.manage',
	'/administration/policies/new load': 'policy.manage',
	'/administration/policies/new action save': 'policy.manage',

	'/api/v1/events GET': 'account.manage',
	'/api/v1/jobs/[job] GET': 'measurement.read',
	'/api/v1/junction/fit POST': 'limit.read',
	'/api/v1/limits/preview POST': 'limit.read',
	'/api/v1/limits/screened POST': 'limit.read',
	'/api/v1/policies GET': 'policy.read',
	'/api/v1/products GET': 'product.read',
	'/api/v1/products/[partNumber] GET': 'product.read',
	'/api/v1/products/[partNumber]/capacitance-table GET': 'limit.read',
	'/api/v1/products/[partNumber]/distributions GET': 'measurement.read',
	'/api/v1/products/[partNumber]/distributions POST': 'measurement.upload',
	'/api/v1/products/[partNumber]/limits/test-limits.csv GET': 'limit.read',
	'/api/v1/products/[partNumber]/limits/what-if POST': 'limit.read',
	'/api/v1/products/[partNumber]/measurement-sets GET': 'measurement.read',
	'/api/v1/products/[partNumber]/measurement-sets POST': 'measurement.upload',
	'/api/v1/releases GET': 'library',
	'/api/v1/releases/[partNumber]/[version]/[file] GET': 'library',
	'/api/v1/uploads/[upload=id] GET': 'measurement.read',
	'/api/v1/uploads/[upload=id]/mapping POST': 'measurement.upload',

	'/templates load': 'template.read',
	'/templates/[key] load': 'template.read'
};
