import { describe, expect, it } from 'vitest';
import { describedBy, errorList, summaryLines } from './field';

describe('what a field says', () => {
	it('names the error before the hint', () => {
		expect(describedBy('name', { hint: 'Short.', errors: ['Needed.'] })).toBe(
			'name-error name-hint'
		);
		expect(describedBy('name', { errors: ['Needed.'] })).toBe('name-error');
		expect(describedBy('name', { hint: 'Short.', errors: [] })).toBe('name-hint');
		expect(describedBy('name', { errors: [] })).toBeUndefined();
	});

	it('takes one sentence, several or none', () => {
		expect(errorList(undefined)).toEqual([]);
		expect(errorList('')).toEqual([]);
		expect(errorList('Needed.')).toEqual(['Needed.']);
		expect(errorList(['A.', 'B.'])).toEqual(['A.', 'B.']);
	});
});

describe('the summary of a form', () => {
	it('leads to fields, also within rows, and keeps what speaks of the whole form', () => {
		expect(
			summaryLines({
				partNumber: ['Taken.'],
				codes: { 1: { code: ['Needed.'] }, _errors: ['At most 40.'] },
				_errors: ['Changed by somebody else.']
			})
		).toEqual([
			{ field: 'partNumber', message: 'Taken.' },
			{ field: 'codes-1-code', message: 'Needed.' },
			{ field: 'codes', message: 'At most 40.' },
			{ message: 'Changed by somebody else.' }
		]);
	});

	it('is empty without errors', () => {
		expect(summaryLines({})).toEqual([]);
		expect(summaryLines({ partNumber: undefined, codes: {} })).toEqual([]);
	});
});
