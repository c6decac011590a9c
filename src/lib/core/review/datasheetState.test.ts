import { describe, expect, it } from 'vitest';
import {
	DATASHEET_STAGES,
	datasheetStateText,
	isAtStage,
	type DatasheetState
} from './datasheetState';

const none: DatasheetState = { release: null, openRevision: null, draft: null };
const draft: DatasheetState = { ...none, draft: 'production' };
const inReview: DatasheetState = { ...draft, openRevision: { number: 9, state: 'inReview' } };
const approved: DatasheetState = { ...draft, openRevision: { number: 9, state: 'approved' } };
const current: DatasheetState = { ...draft, release: { major: 2, minor: 0, state: 'current' } };
const both: DatasheetState = { ...current, openRevision: { number: 10, state: 'inReview' } };
const withdrawn: DatasheetState = { ...none, release: { major: 1, minor: 3, state: 'withdrawn' } };

describe('how far a datasheet has come', () => {
	it.each([
		[none, 'none yet'],
		[draft, 'draft open'],
		[inReview, 'revision 9 in review'],
		[current, '2.0 current, draft open'],
		[both, '2.0 current, revision 10 in review'],
		[withdrawn, '1.3 withdrawn']
	])('is said in a line', (state, text) => expect(datasheetStateText(state)).toBe(text));

	it.each([
		['none', none, ['none']],
		['draft', draft, ['draft']],
		['in review', inReview, ['inReview']],
		['approved', approved, ['approved']],
		['published', current, ['current']],
		['published and in review', both, ['inReview', 'current']],
		['withdrawn', withdrawn, []]
	])('is at its stages when %s', (_name, state, stages) => {
		const keys = Object.keys(DATASHEET_STAGES) as (keyof typeof DATASHEET_STAGES)[];
		expect(keys.filter((stage) => isAtStage(state, stage))).toEqual(stages);
	});
});
