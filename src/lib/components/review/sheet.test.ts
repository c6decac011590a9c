import { describe, expect, it } from 'vitest';
import type { VerificationEvidence } from '$lib/core/review/verificationEvidence';
import {
	columnDecimalsOf,
	countRows,
	fileSize,
	groupRows,
	initials,
	instantText,
	printedSides,
	signedPercent,
	type SheetEntry
} from './sheet';

const evidence = (changes: Partial<VerificationEvidence> = {}): VerificationEvidence => ({
	kind: 'rating',
	group: 'Limiting values',
	groupConditions: '',
	label: 'V_R',
	unit: 'V',
	printed: { minimum: null, typical: null, maximum: '30' },
	basis: null,
	note: '',
	digits: [],
	computed: null,
	previous: null,
	risk: 'high',
	concerns: [],
	...changes
});

const entry = (
	row: string,
	state: SheetEntry['state'],
	changes: Partial<VerificationEvidence> = {}
): SheetEntry => ({ row, state, at: null, byName: null, comments: 0, evidence: evidence(changes) });

const rows = [
	entry('a', 'ticked', { risk: 'low' }),
	entry('b', 'open', { risk: 'low', group: 'C_tot' }),
	entry('c', 'flagged'),
	entry('d', 'open', { risk: 'pending', group: 'C_tot' })
];

it('counts rows, and of the open ones those of low risk', () => {
	expect(countRows(rows)).toEqual({
		total: 4,
		ticked: 1,
		flagged: 1,
		open: 2,
		lowRisk: 1,
		pending: 1
	});
});

it('groups rows under their heads in the order of the heads', () => {
	expect(groupRows(rows).map(({ title, rows: members }) => [title, members.length])).toEqual([
		['Limiting values', 2],
		['C_tot', 2]
	]);
});

it('names the sides that are printed', () => {
	expect(printedSides(evidence())).toEqual(['maximum']);
});

it('takes the decimals of a group from what is printed in it', () => {
	const group = {
		rows: [
			entry('a', 'open', { printed: { minimum: '1.83', typical: null, maximum: '20.1' } }),
			entry('b', 'open')
		]
	};
	expect(columnDecimalsOf(group)).toEqual({ printed: 2, second: 0 });
});

describe('texts', () => {
	it.each([
		[0.254, 2, '+0.25'],
		[-2.34, 1, '−2.3'],
		[-0.001, 2, '0.00']
	])('%f with %i decimals is %s', (percent, decimals, text) => {
		expect(signedPercent(percent, decimals)).toBe(text);
	});

	it('are short where there is little room', () => {
		expect(initials('Tomas Rehak')).toBe('TR');
		expect(instantText('2025-02-17T14:05:59.123Z')).toBe('2025-02-17 14:05 UTC');
		expect(fileSize(841)).toBe('841 B');
		expect(fileSize(49_076)).toBe('49 kB');
	});
});
