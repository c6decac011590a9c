import { expect, it } from 'vitest';
import { symbolRuns } from './symbolRuns';

const symbol = (quantity: string, subscript: string) => ({ kind: 'symbol', quantity, subscript });
const text = (words: string) => ({ kind: 'text', text: words });

it.each([
	['V_R = 4 V', [symbol('V', 'R'), text(' = 4 V')]],
	['V_(BR) min', [symbol('V', '(BR)'), text(' min')]],
	['R_th(j-a)', [symbol('R', 'th(j-a)')]],
	['f = 1 MHz, T_j = 25 °C', [text('f = 1 MHz, '), symbol('T', 'j'), text(' = 25 °C')]],
	['no symbol', [text('no symbol')]],
	['', []]
])('reads %s', (given, runs) => expect(symbolRuns(given)).toEqual(runs));
