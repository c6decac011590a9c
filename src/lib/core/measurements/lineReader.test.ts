import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { measurementMessages } from '../messages/measurements';
import { readNumber } from '../units/readNumber';
import { LineReader } from './lineReader';
import type { ColumnMapping } from './mapping';
import { decimalsIn, NumberScanner } from './scanNumber';

const column = (
	meaning: ColumnMapping['columns'][number]['meaning'],
	unit: string | null = null
) => ({
	header: meaning,
	meaning,
	unit
});

function mappingWith(
	separator: ColumnMapping['dialect']['separator'],
	decimalMark: '.' | ','
): ColumnMapping {
	return {
		dialect: {
			encoding: 'utf-8',
			separator,
			decimalMark,
			commentPrefix: '',
			headerLine: 1,
			dataLine: 2,
			fieldCount: 7
		},
		columns: [
			column('lot'),
			column('wafer'),
			column('device'),
			column('temperature', 'K'),
			column('frequency', 'MHz'),
			column('bias', 'mV'),
			column('capacitance', 'pF')
		],
		biasSign: 'reverseNegative',
		skipLines: 0
	};
}

const bytes = (text: string) => new TextEncoder().encode(text);

/** Everything a reader says of a line. */
function said(reader: LineReader, problem: string | undefined) {
	const { names, temperatureCelsius, frequency, bias, value, decimals } = reader;
	return problem === undefined
		? { names: { ...names }, temperatureCelsius, frequency, bias, value, decimals }
		: { problem };
}

function fast(line: string, mapping: ColumnMapping) {
	const reader = new LineReader(mapping);
	const all = bytes(`x${line}y`);
	return said(reader, reader.read(all, 1, all.length - 1));
}

function slow(line: string, mapping: ColumnMapping) {
	const reader = new LineReader(mapping);
	return said(reader, reader.readText(line));
}

describe('both paths', () => {
	const part = fc.oneof(
		fc.double({ noNaN: true }).map(String),
		fc.integer({ min: -1000, max: 1000 }).map(String),
		fc
			.tuple(fc.integer({ min: 0, max: 99_999 }), fc.integer({ min: 0, max: 999 }))
			.map(([whole, fraction]) => `${whole}.${String(fraction).padStart(3, '0')}`),
		fc.constantFrom('', ' ', '0', '-0', '+5.', '.5', '1e-11', '9.9E+37', '1e999', 'NaN', 'open'),
		fc.constantFrom('"quoted"', '"a,b"', '"say ""so"""', '"open', 'LK24-031', 'µ ° ä', '\ufffd'),
		fc.constantFrom(
			'\u00a05',
			' 12.5 ',
			'\t7',
			'\u22120.3',
			'0x1f',
			'1,5',
			'1;5',
			'5"',
			'1e5',
			'5E-3'
		)
	);
	const separators = fc.constantFrom(',' as const, ';' as const, '\t' as const, '|' as const);
	const marks = fc.constantFrom('.' as const, ',' as const);

	it('give the same answer for any line', () => {
		fc.assert(
			fc.property(
				fc.array(part, { minLength: 5, maxLength: 9 }),
				separators,
				marks,
				(parts, separator, mark) => {
					const mapping = mappingWith(separator, mark);
					const line = parts.join(separator);
					expect(fast(line, mapping)).toEqual(slow(line, mapping));
				}
			),
			{ numRuns: 3000 }
		);
	});

	it('give the same answer for lines that are mostly good', () => {
		const good = fc.tuple(
			fc.constantFrom('A', 'B ', '"C"'),
			fc.constantFrom('1', '', '07'),
			fc.constantFrom('D1', 'D 2'),
			fc.constantFrom('298.15', '233.15', '-1', '300'),
			fc.constantFrom('1', '0.1', '0', '1e-3'),
			fc.double({ min: -5e4, max: 5e4, noNaN: true }).map(String),
			fc.double({ min: -1, max: 1e3, noNaN: true }).map(String)
		);
		fc.assert(
			fc.property(good, (parts) => {
				const mapping = mappingWith(';', '.');
				expect(fast(parts.join(';'), mapping)).toEqual(slow(parts.join(';'), mapping));
			}),
			{ numRuns: 2000 }
		);
	});
});

describe('a line', () => {
	const mapping = mappingWith(';', ',');

	it('is read in the units of its columns, with reverse bias positive', () => {
		expect(fast('A;1;D1;298,15;0,1;-500;38,250', mapping)).toEqual({
			names: { lot: 'A', waferLot: '', wafer: '1', site: '', element: '', device: 'D1' },
			temperatureCelsius: 25,
			frequency: 100_000,
			bias: 0.5,
			value: 38.25,
			decimals: 3
		});
	});

	it('gives a bias of 0 the plain zero', () => {
		const reader = new LineReader(mapping);
		const line = bytes('A;1;D1;298,15;1;0;38,25');
		reader.read(line, 0, line.length);
		expect(Object.is(reader.bias, 0)).toBe(true);
	});

	it('may end in a separator', () => {
		expect(fast('A;1;D1;298,15;1;0;38,25;', mapping)).not.toHaveProperty('problem');
	});

	it.each([
		['A;1;D1;298,15;1;0', measurementMessages.fieldCount(7, 6)],
		['A;1;D1;298,15;1;0;38;9', measurementMessages.fieldCount(7, 8)],
		[';1;D1;298,15;1;0;38', measurementMessages.nameEmpty('lot')],
		['A;1;;298,15;1;0;38', measurementMessages.nameEmpty('device')],
		['A;1;D1;;1;0;38', measurementMessages.notANumber('temperature', '')],
		['A;1;D1;-0,5;1;0;38', measurementMessages.temperatureBelowZero('-0,5')],
		['A;1;D1;298,15;0;0;38', measurementMessages.frequencyNotPositive('0')],
		['A;1;D1;298,15;1;x;38', measurementMessages.notANumber('bias', 'x')],
		['A;1;D1;298,15;1;0;0', measurementMessages.capacitanceNotPositive('0')],
		['A;1;D1;298,15;1;0;-3', measurementMessages.capacitanceNotPositive('-3')],
		['A;1;D1;298,15;1;0;9,9E+37', measurementMessages.capacitanceOverflow('9,9E+37')],
		['A;1;D1;298,15;1;0;NaN', measurementMessages.notANumber('capacitance', 'NaN')],
		['A;"1;D1;298,15;1;0;38', measurementMessages.quoteNotClosed()]
	])('%s is refused', (line, problem) => {
		expect(fast(line, mapping)).toEqual({ problem });
	});

	it('with bytes that are no text in a name is refused', () => {
		const reader = new LineReader(mapping);
		const line = Uint8Array.from([...bytes('A'), 0xb0, ...bytes(';1;D1;298,15;1;0;38')]);
		expect(reader.read(line, 0, line.length)).toBe(measurementMessages.badBytes());
	});
});

describe('NumberScanner', () => {
	it('reads to the last bit what the language’s own parser reads', () => {
		const digits = fc.stringMatching(/^[+-]?\d{1,12}(\.\d{0,6})?([eE][+-]?\d{1,2})?$/);
		const scanner = new NumberScanner('.'.charCodeAt(0));
		fc.assert(
			fc.property(digits, (text) => {
				const line = bytes(text);
				if (!scanner.scan(line, 0, line.length)) return;
				expect(Object.is(scanner.value, readNumber(text))).toBe(true);
				expect(scanner.decimals).toBe(decimalsIn(text));
			}),
			{ numRuns: 5000 }
		);
	});

	it('takes what testers write itself', () => {
		const scanner = new NumberScanner('.'.charCodeAt(0));
		for (const text of ['38.250', '0', '-40', '1000000', '3.825E-11', '+0.25']) {
			const line = bytes(text);
			expect([text, scanner.scan(line, 0, line.length), scanner.value]).toEqual([
				text,
				true,
				Number(text)
			]);
		}
	});
});
