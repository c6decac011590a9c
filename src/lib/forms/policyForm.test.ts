import { describe, expect, it } from 'vitest';
import { policyDifference } from '$lib/core/limits/policyDifference';
import type { LimitPolicy } from '$lib/core/limits/policy';
import { PLAIN_POLICY } from '$lib/core/limits/limitTestData';
import { policyMessages } from '$lib/core/messages/policies';
import { policyFields, policyForm, policyRulesOf, type PolicyForm } from './policyForm';

const FULL: LimitPolicy = {
	...PLAIN_POLICY,
	method: 'sigma',
	k: 4,
	drift: { minimum: { relative: 0.005 }, maximum: { absolute: 1e-13 } },
	guardBand: 1,
	resolution: { step: 0.1 },
	testResolution: { significantFigures: 5 }
};

describe('the form of a policy', () => {
	it.each([PLAIN_POLICY, FULL, { ...PLAIN_POLICY, drift: 0.005 }])(
		'gives back the rules it shows',
		(rules) => {
			const read = policyForm.safeParse(policyFields(rules, 2));
			expect(read.error).toBeUndefined();
			expect(policyRulesOf(policyForm.parse(policyFields(rules, 2)))).toEqual(rules);
		}
	);

	it.each<[Partial<PolicyForm>, string]>([
		[{ name: ' ' }, policyMessages.nameNeeded()],
		[{ content: '1' }, policyMessages.shareFormat()],
		[{ minimumLots: '1.5' }, policyMessages.lotsFormat()],
		[{ driftMinimum: '100 %' }, policyMessages.driftFormat()],
		[{ driftMaximum: '-1' }, policyMessages.driftFormat()],
		[{ guardBand: '11' }, policyMessages.guardBandFormat()],
		[{ resolution: '9' }, policyMessages.resolutionFormat('figures')],
		[{ resolutionKind: 'step', resolution: '0' }, policyMessages.resolutionFormat('step')],
		[{ testResolutionKind: 'step' }, policyMessages.resolutionFormat('step')],
		[{ span: 'whole-curve' }, policyMessages.wholeCurveNeedsLots()],
		[{ method: 'lots', minimumLots: '2' }, policyMessages.lotsMethodNeeds(3)]
	])('refuses %j beside its field', (change, message) => {
		const read = policyForm.safeParse({ ...policyFields(PLAIN_POLICY, 1), ...change });
		const [field] = Object.keys(change).slice(-1);
		expect(read.error?.issues.map((issue) => [String(issue.path[0]), issue.message])).toEqual([
			[change.testResolutionKind ? 'testResolution' : change.span ? 'span' : field, message]
		]);
	});
});

it('says what a version changes', () => {
	expect(policyDifference(PLAIN_POLICY, PLAIN_POLICY)).toEqual([]);
	expect(policyDifference(PLAIN_POLICY, { ...PLAIN_POLICY, content: 0.95, guardBand: 1 })).toEqual([
		{ what: 'Content P', before: '0.99', after: '0.95' },
		{ what: 'Guard band r', before: 'none', after: '1' }
	]);
});
