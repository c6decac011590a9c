import { expect, it } from 'vitest';
import { plainText } from './plainText';
import { symbolRuns } from './symbolRuns';

const symbols = (text: string) =>
	symbolRuns(text).flatMap((run) => (run.kind === 'symbol' ? [run.symbol] : []));

it.each([
	['V_R = 4 V', [{ quantity: 'V', subscript: 'R' }]],
	[
		'C_tot at V_R = 4 V',
		[
			{ quantity: 'C', subscript: 'tot' },
			{ quantity: 'V', subscript: 'R' }
		]
	],
	[
		'V_(BR) at I_R',
		[
			{ quantity: 'V', subscript: '(BR)' },
			{ quantity: 'I', subscript: 'R' }
		]
	],
	['R_th(j-a)', [{ quantity: 'R', subscript: 'th(j-a)' }]],
	['f = 1 MHz', [{ quantity: 'f' }]],
	['half sine, t = 8.3 ms', [{ quantity: 't' }]],
	['of it, off', []],
	['LKT_A and snake_case', []]
])('%s has the symbols %j', (text, expected) => {
	expect(symbols(text)).toEqual(expected);
	expect(plainText(symbolRuns(text))).toBe(text);
});
