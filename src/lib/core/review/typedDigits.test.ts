import { expect, it } from 'vitest';
import type { RichText } from '../datasheet/document';
import { typedDigits } from './typedDigits';

const text = (words: string): RichText => [{ kind: 'text', text: words }];

it.each([
	['a sentence without any', []],
	['rated for 30 V and 1.5 A', ['30', '1.5']],
	['from −55 to +150 °C, ±2 %', ['−55', '+150', '±2']],
	['LKT-1130 in a 2-pin package', ['2']]
])('%s', (words, digits) => {
	expect(typedDigits(text(words), 'LKT-1130')).toEqual(digits);
});

it('leaves bound values to their own rows', () => {
	const runs: RichText = [
		{ kind: 'text', text: 'at most ' },
		{ kind: 'value', text: '12.7 pF', slot: 'capacitance.25c.VR=4' },
		{ kind: 'text', text: ' at 4 V' }
	];
	expect(typedDigits(runs, 'LKT-1130')).toEqual(['4']);
});
