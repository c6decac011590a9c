import { expect, it } from 'vitest';
import { csvText } from './csvText';

it('quotes what needs quotes and leaves out what is not there', () => {
	expect(
		csvText([
			['a', 'b'],
			['1,5 "mm"', null],
			[12.5, 'µ\nV']
		])
	).toBe('\ufeffa,b\r\n"1,5 ""mm""",\r\n12.5,"µ\nV"\r\n');
});

it('hands no formula to a spreadsheet, and keeps negative numbers', () => {
	expect(csvText([['=1+1', '@x', '+1', '-x', '-40', '-.5', -3]])).toBe(
		"\ufeff'=1+1,'@x,'+1,'-x,-40,-.5,-3\r\n"
	);
});
