import { expect, it } from 'vitest';
import { limitInputText, type LimitInput } from './limitInput';
import { threeSmallLots } from './limitTestData';

const input: LimitInput = {
	partNumber: 'LKT-1130',
	distribution: threeSmallLots(),
	unit: 'pF',
	unitScale: 1e-12,
	declaredBasis: 'characterized',
	sides: ['minimum', 'maximum'],
	policyHash: 'abc',
	usesExtremes: false
};

it('is the same for the same inputs', () => {
	expect(limitInputText({ ...input, distribution: threeSmallLots() })).toBe(limitInputText(input));
});

it.each<[string, Partial<LimitInput>]>([
	['another product', { partNumber: 'LKT-1131' }],
	['another stated uncertainty', { distribution: threeSmallLots({ uncertainty: 0.01 }) }],
	['another condition', { distribution: threeSmallLots({ conditionKey: 'T=85;VR=4' }) }],
	[
		'devices moved between lots',
		{ distribution: threeSmallLots({ groups: threeSmallLots().groups.slice(1) }) }
	],
	['another unit', { unit: 'nF', unitScale: 1e-9 }],
	['another basis', { declaredBasis: 'tested' }],
	['one side alone', { sides: ['minimum'] }],
	['another policy', { policyHash: 'abd' }],
	['devices that matter one by one', { usesExtremes: true }]
])('differs with %s', (_, change) => {
	expect(limitInputText({ ...input, ...change })).not.toBe(limitInputText(input));
});
