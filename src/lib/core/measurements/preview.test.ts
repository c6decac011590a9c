import { describe, expect, it } from 'vitest';
import { recogniseColumn, recogniseColumns } from './columns';
import { FileSurvey } from './fileSurvey';
import { previewUpload } from './preview';

function preview(text: string) {
	const outcome = previewUpload(text, {
		encoding: 'utf-8',
		lineCount: text.split('\n').length
	});
	if (outcome.status !== 'read') throw new Error(outcome.status);
	return outcome.preview;
}

describe('columns', () => {
	it.each([
		['C [pF]', 'capacitance', 'pF'],
		['capacitance_pF', 'capacitance', 'pF'],
		['Bias (V)', 'bias', 'V'],
		['V_R/V', 'bias', 'V'],
		['V_R', 'bias', undefined],
		['Temp (°C)', 'temperature', '°C'],
		['T [K]', 'temperature', 'K'],
		['Freq, kHz', 'frequency', 'kHz'],
		['C [V]', 'capacitance', undefined],
		['Cap', 'capacitance', undefined],
		['Lot ID', 'lot', undefined],
		['Wafer No.', 'wafer', undefined],
		['wafer_lot', 'waferLot', undefined],
		['DUT', 'device', undefined],
		['operator', 'ignore', undefined],
		['I_R [nA]', 'reverseCurrent', 'nA'],
		['value [mΩ]', 'value', 'mΩ'],
		['Value', 'value', undefined],
		['di_F/dt [A/µs]', 'currentSlope', 'A/µs'],
		['pulse duration [µs]', 'pulseDuration', 'µs'],
		['ambient', 'ignore', undefined]
	] as const)('%s is %s in %s', (header, meaning, unit) => {
		const column = recogniseColumn(header);
		expect([column.meaning, column.unit?.symbol]).toEqual([meaning, unit]);
	});

	it('give a meaning to the first that names it only', () => {
		expect(recogniseColumns(['C [pF]', 'Cp [pF]']).map(({ meaning }) => meaning)).toEqual([
			'capacitance',
			'ignore'
		]);
	});
});

describe('dialects', () => {
	it.each([
		['commas', 'lot,V [V],C [pF]\nA,0,38.5\nA,4,13.7\n', ',', '.', 1],
		['semicolons with decimal commas', 'lot;V [V];C [pF]\nA;0,5;38,5\nA;4;13,7\n', ';', ',', 1],
		['two columns with decimal commas', 'V;C\n0,5;38,5\n4,0;13,7\n', ';', ',', 1],
		['tabs', 'lot\tV [V]\tC [pF]\nA\t0\t38.5\nA\t4\t13.7\n', '\t', '.', 1],
		['no header', 'A,0,38.5\nA,4,13.7\n', ',', '.', 0],
		['quoted names', '"lot","V [V]","C [pF]"\r\n"A","0","38.5"\r\n"A","4","13.7"\r\n', ',', '.', 1],
		[
			'lines above the table',
			'Bench 4\nOperator: none\n\nlot,V [V],C [pF]\nA,0,38.5\nA,4,13.7\nA,5,12\nA,6,11\n',
			',',
			'.',
			4
		]
	] as const)('with %s are recognised', (_, text, separator, decimalMark, headerLine) => {
		expect(preview(text).dialect).toMatchObject({ separator, decimalMark, headerLine });
	});

	it('keep comments out of the preview', () => {
		const { dialect, lines } = preview('# bench 4\nlot,V,C\nA,0,38.5\n# paused\nA,4,13.7\n');
		expect(dialect).toMatchObject({ commentPrefix: '#', headerLine: 2, dataLine: 3 });
		expect(lines).toEqual([
			{ number: 3, fields: ['A', '0', '38.5'] },
			{ number: 5, fields: ['A', '4', '13.7'] }
		]);
	});

	it.each([
		['', 'noTable'],
		['a\nb\nc\n', 'noTable'],
		['a,b\nc,d\n', 'noTable'],
		['lot,V,C', 'noTable']
	])('that are no tables are not: %j', (text, status) => {
		expect(previewUpload(text, { encoding: 'utf-8', lineCount: 1 }).status).toBe(status);
	});

	it('number a name that comes twice by its place', () => {
		expect(preview('lot,C,C\nA,1,2\nA,3,4\n').columns.map(({ header }) => header)).toEqual([
			'lot',
			'C',
			'C (column 3)'
		]);
	});
});

describe('bias sign', () => {
	it.each([
		['0,38.5\n4,13.7\n10,5.1', 'reversePositive'],
		['0,38.5\n-4,13.7\n-10,5.1', 'reverseNegative'],
		['10,5.1\n4,13.7\n0,38.5', 'reversePositive'],
		['0,38.5\n4,38.5\n10,38.5', null],
		['0,38.5\n4,39\n10,38.5', null]
	])('of %j is %s', (rows, sign) => {
		expect(preview(`V,C\n${rows}\n`).biasSign).toBe(sign);
	});

	it('is not read across devices', () => {
		const text = 'device,V,C\nD1,0,38\nD1,4,13\nD2,0,39\nD2,4,14\nD3,0,40\nD3,4,15\n';
		expect(preview(text).biasSign).toBe('reversePositive');
	});
});

describe('the first look', () => {
	const survey = (...pieces: readonly Uint8Array[]) => {
		const look = new FileSurvey();
		for (const piece of pieces) look.push(piece);
		return look.outcome();
	};
	const utf8 = (text: string) => new TextEncoder().encode(text);

	it('counts lines whether or not the last one ends', () => {
		expect(survey(utf8('a\nb'), utf8('c\nd'))).toMatchObject({ status: 'text', lineCount: 3 });
		expect(survey(utf8('a\nb\n'))).toMatchObject({ lineCount: 2 });
	});

	it('takes bytes that are no UTF-8 for windows-1252, and leaves the mark at the start out', () => {
		expect(survey(Uint8Array.of(0x54, 0x20, 0xb0, 0x43))).toMatchObject({
			encoding: 'windows-1252',
			head: 'T °C'
		});
		expect(survey(Uint8Array.of(0xef, 0xbb, 0xbf, 0x61))).toMatchObject({
			encoding: 'utf-8',
			head: 'a'
		});
	});

	it.each([
		['empty', []],
		['utf16', [0xff, 0xfe, 0x61, 0x00]],
		['binary', [0x50, 0x4b, 0x03, 0x00]]
	])('says when a file is %s', (status, of) => {
		expect(survey(Uint8Array.from(of)).status).toBe(status);
	});
});
