import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { parseProse } from './parseProse';

describe('an inline binding', () => {
	it('names a characteristic, its conditions and a part', () => {
		expect(parseProse('near {C_tot @ V_R=4 V, T_j=−40 °C, f = 1 MHz : typ}.')).toEqual([
			{ kind: 'text', text: 'near ', position: 0 },
			{
				kind: 'reference',
				text: '{C_tot @ V_R=4 V, T_j=−40 °C, f = 1 MHz : typ}',
				position: 5,
				reference: {
					name: 'C_tot',
					reverseVoltage: 4,
					temperatureCelsius: -40,
					frequency: 1e6,
					part: 'typical'
				}
			},
			{ kind: 'text', text: '.', position: 51 }
		]);
	});

	it('may have no conditions, as a rating has none', () => {
		expect(parseProse('{V_R : max}')[0]).toMatchObject({
			kind: 'reference',
			reference: { name: 'V_R', reverseVoltage: null, temperatureCelsius: null, part: 'maximum' }
		});
	});

	it.each([
		'{C_tot}',
		'{C_tot @ V_R=4 V}',
		'{C_tot @ V_R=4 V : mean}',
		'{C_tot @ V_R=4 pF : typ}',
		'{C_tot @ V_F=4 V : typ}',
		'{C_tot @ V_R=4 V, V_R=5 V : typ}',
		'{: typ}'
	])('%s can’t be read', (text) => {
		expect(parseProse(text)).toEqual([{ kind: 'unread', text, isOpen: false, position: 0 }]);
	});

	it('that is never closed is one token to the end', () => {
		expect(parseProse('a {C_tot @ V')).toEqual([
			{ kind: 'text', text: 'a ', position: 0 },
			{ kind: 'unread', text: '{C_tot @ V', isOpen: true, position: 2 }
		]);
	});
});

it('loses no character of any text', () => {
	const pieces = fc.constantFrom('{', '}', 'C_tot', ' @ V_R=4 V', ' : typ', 'words', ' ', '\n');
	fc.assert(
		fc.property(fc.array(pieces), (parts) => {
			const text = parts.join('');
			const tokens = parseProse(text);
			expect(tokens.map((token) => token.text).join('')).toBe(text);
			for (const token of tokens) {
				expect(text.startsWith(token.text, token.position)).toBe(true);
			}
		})
	);
});
