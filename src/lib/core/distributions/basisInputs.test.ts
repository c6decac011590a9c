import { expect, it } from 'vitest';
import { basisText, type BasisInputs } from './basisInputs';

const inputs: BasisInputs = {
	partNumber: 'LKT-1130',
	characteristic: 'C_tot',
	transform: 'ln',
	sets: [
		{ id: 1, sha256: 'aa', uncertainty: 0.003 },
		{ id: 2, sha256: 'bb', uncertainty: null }
	],
	waferLots: new Map([
		['L1', 'W1'],
		['L2', 'W2']
	]),
	leftOut: [
		{ set: 1, device: 4, conditionKey: 'T=25', why: 'quarantined' },
		{ set: 1, device: 9, conditionKey: 'T=25', why: 'excluded' }
	]
};

it('is the same in whatever order the inputs are found', () => {
	expect(
		basisText({
			...inputs,
			sets: inputs.sets.toReversed(),
			waferLots: new Map([...inputs.waferLots].reverse()),
			leftOut: inputs.leftOut.toReversed()
		})
	).toBe(basisText(inputs));
});

it.each<[string, Partial<BasisInputs>]>([
	['another set', { sets: [...inputs.sets, { id: 3, sha256: 'cc', uncertainty: null }] }],
	['a verdict', { leftOut: inputs.leftOut.slice(1) }],
	[
		'a corrected genealogy',
		{
			waferLots: new Map([
				['L1', 'W1'],
				['L2', 'W1']
			])
		}
	],
	['another product', { partNumber: 'LKT-1131' }]
])('changes with %s', (_, change) => {
	expect(basisText({ ...inputs, ...change })).not.toBe(basisText(inputs));
});
