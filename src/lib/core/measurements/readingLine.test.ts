import { describe, expect, it } from 'vitest';
import { measurementMessages } from '../messages/measurements';
import type { ColumnMeaning } from './columns';
import type { ColumnMapping } from './mapping';
import { ReadingLineReader } from './readingLine';

const COLUMNS: readonly (readonly [ColumnMeaning, string | null])[] = [
	['lot', null],
	['wafer', null],
	['device', null],
	['characteristic', null],
	['temperature', '°C'],
	['bias', 'V'],
	['forwardCurrent', 'mA'],
	['value', null],
	['unit', null],
	['censored', null]
];

function readerOf(columns = COLUMNS, said: Partial<ColumnMapping> = {}) {
	const mapping: ColumnMapping = {
		dialect: {
			encoding: 'utf-8',
			separator: ',',
			decimalMark: '.',
			commentPrefix: '',
			headerLine: 1,
			dataLine: 2,
			fieldCount: columns.length
		},
		columns: columns.map(([meaning, unit]) => ({ header: meaning, meaning, unit })),
		biasSign: 'reversePositive',
		skipLines: 0,
		...said
	};
	return new ReadingLineReader(mapping, null);
}

function readingOf(line: string, reader = readerOf()) {
	const read = reader.read(line);
	if (read.status === 'refused') throw new Error(read.message);
	const { characteristic, unit, ...reading } = read.reading;
	return { ...reading, characteristic: characteristic.key, unit: unit.symbol };
}

function refusalOf(line: string, reader = readerOf()) {
	const read = reader.read(line);
	return read.status === 'refused' ? read.message : read.reading;
}

describe('a line of readings', () => {
	it('is read with its condition, and its value stays in the unit of the file', () => {
		expect(readingOf('A,3,D1,I_R,25,60,,12.50,nA,')).toEqual({
			lot: 'A',
			waferLot: '',
			wafer: '3',
			site: '',
			element: '',
			device: 'D1',
			characteristic: 'I_R',
			condition: { temperatureCelsius: 25, reverseVoltage: 60 },
			value: 12.5,
			unit: 'nA',
			censored: 0,
			decimals: 2
		});
	});

	it('gives a forward current in amperes, as decimals and not as binary products', () => {
		expect(readingOf('A,3,D1,V_F,-40,,100,0.312,V,').condition).toEqual({
			temperatureCelsius: -40,
			forwardCurrent: 0.1
		});
	});

	it.each([
		['V_(BR)', 'R_th(j-mb)'],
		['VBR', 'Rth(j-mb)'],
		['V(BR)', 'R_th_j-mb'],
		['Breakdown voltage', 'Thermal resistance from junction to mounting base']
	])('may set the symbol as %s and %s', (_, thermal) => {
		expect(readingOf(`A,3,D1,${thermal},25,,,1.25,K/W,`).characteristic).toBe('R_th(j-mb)');
	});

	it.each([
		['<0.1,nA,', -1],
		['<=0.1,nA,', -1],
		['≤ 0.1,nA,', -1],
		['0.1,nA,<', -1],
		['0.1,nA,<=', -1],
		['0.1,nA,-1', -1],
		['<0.1,nA,<', -1],
		['>0.1,nA,', 1],
		['0.1,nA,≥', 1],
		['0.1,nA,1', 1],
		['0.1,nA,=', 0],
		['0.1,nA,', 0]
	])('ending in %s has the flag %d', (end, censored) => {
		expect(readingOf(`A,3,D1,I_R,25,60,,${end}`)).toMatchObject({ value: 0.1, censored });
	});

	it('takes a reverse bias as negative where the file does', () => {
		const reader = readerOf(COLUMNS, { biasSign: 'reverseNegative' });
		expect(readingOf('A,3,D1,I_R,25,-60,,1,nA,', reader).condition.reverseVoltage).toBe(60);
		expect(refusalOf('A,3,D1,I_R,25,60,,1,nA,', reader)).toBe(
			measurementMessages.conditionNotPositive('bias', '60')
		);
	});

	it('takes the unit of the column where no line states one, and refuses what it does not fit', () => {
		const reader = readerOf([
			['lot', null],
			['device', null],
			['characteristic', null],
			['temperature', '°C'],
			['bias', 'V'],
			['value', 'µA']
		]);
		expect(readingOf('A,D1,I_R,25,60,3', reader)).toMatchObject({ value: 3, unit: 'µA' });
		expect(refusalOf('A,D1,R_th(j-mb),25,,3', reader)).toBe(
			measurementMessages.unitForeign('R_th(j-mb)', 'µA')
		);
	});

	it.each([
		['A,3,"D1,I_R,25,60,,1,nA,', measurementMessages.quoteNotClosed()],
		['A,3,D1,I_R,25,60,,1,nA', measurementMessages.fieldCount(10, 9)],
		['A,3,D1,I_R,25,60,,1,nA,,x', measurementMessages.fieldCount(10, 11)],
		[',3,D1,I_R,25,60,,1,nA,', measurementMessages.nameEmpty('lot')],
		['A,3,,I_R,25,60,,1,nA,', measurementMessages.nameEmpty('device')],
		['A,3,D1,,25,60,,1,nA,', measurementMessages.nameEmpty('characteristic')],
		['A,3,D\ufffd,I_R,25,60,,1,nA,', measurementMessages.badBytes()],
		['A,3,D1,I_X,25,60,,1,nA,', measurementMessages.characteristicUnknown('I_X')],
		['A,3,D1,C_tot,25,4,,1,pF,', measurementMessages.characteristicSwept('C_tot')],
		['A,3,D1,C_ratio,25,4,,1,pF,', measurementMessages.characteristicDerived('C_ratio')],
		['A,3,D1,I_R,,60,,1,nA,', measurementMessages.notANumber('temperature', '')],
		['A,3,D1,I_R,-300,60,,1,nA,', measurementMessages.temperatureBelowZero('-300')],
		['A,3,D1,I_R,25,,,1,nA,', measurementMessages.conditionMissing('I_R', 'bias')],
		['A,3,D1,I_R,25,sixty,,1,nA,', measurementMessages.notANumber('bias', 'sixty')],
		['A,3,D1,I_R,25,-60,,1,nA,', measurementMessages.conditionNotPositive('bias', '-60')],
		['A,3,D1,V_F,25,,0,0.5,V,', measurementMessages.conditionNotPositive('forwardCurrent', '0')],
		['A,3,D1,V_F,25,,,0.5,V,', measurementMessages.conditionMissing('V_F', 'forwardCurrent')],
		['A,3,D1,V_F,25,60,100,0.5,V,', measurementMessages.conditionForeign('V_F', 'bias')],
		['A,3,D1,I_R,25,60,,1,,', measurementMessages.unitEmpty()],
		['A,3,D1,I_R,25,60,,1,V,', measurementMessages.unitForeign('I_R', 'V')],
		['A,3,D1,I_R,25,60,,1,NA,', measurementMessages.unitForeign('I_R', 'NA')],
		['A,3,D1,I_R,25,60,,,nA,', measurementMessages.notANumber('value', '')],
		['A,3,D1,I_R,25,60,,open,nA,', measurementMessages.notANumber('value', 'open')],
		['A,3,D1,I_R,25,60,,<,nA,', measurementMessages.notANumber('value', '<')],
		['A,3,D1,I_R,25,60,,1,nA,low', measurementMessages.flagUnknown('low')],
		['A,3,D1,I_R,25,60,,<1,nA,>', measurementMessages.flagsDiffer('<1', '>')],
		['A,3,D1,I_R,25,60,,0,nA,', measurementMessages.readingZero('I_R')],
		['A,3,D1,I_R,25,60,,0.00,nA,<', measurementMessages.readingZero('I_R')],
		['A,3,D1,I_R,25,60,,-1,nA,', measurementMessages.readingNegative('I_R', '-1')],
		['A,3,D1,V_F,25,,100,-0.3,V,', measurementMessages.readingNegative('V_F', '-0.3')],
		['A,3,D1,V_F,25,,100,9.9e37,V,', measurementMessages.readingOverflow('V_F', '9.9e37')]
	])('is refused with its reason: %s', (line, message) => {
		expect(refusalOf(line)).toBe(message);
	});

	it('says in words what is wrong and what to do', () => {
		expect(measurementMessages.readingZero('I_R')).toBe(
			'I_R is 0, and its logarithm is needed. Where the tester can’t tell less than its floor, write the floor with a “<”.'
		);
		expect(measurementMessages.conditionForeign('V_F', 'bias')).toBe(
			'V_F is not measured at a reverse voltage; leave the field empty.'
		);
	});
});
