import { describe, expect, it } from 'vitest';
import { previewUpload } from '$lib/core/measurements/preview';
import { completeMapping } from '$lib/core/measurements/requestedMapping';
import { measurementMessages } from '$lib/core/messages/measurements';
import { columnField, mappingValues, readMappingForm } from './mappingForm';

const outcome = previewUpload('lot,device,T [C],V_R [V],C\nA,D1,25,0,38\nA,D1,25,4,13\n', {
	encoding: 'utf-8',
	lineCount: 3
});
if (outcome.status !== 'read') throw new Error(outcome.status);
const { preview } = outcome;
const recognised = mappingValues(preview, null);
const unit = columnField(4, 'unit');

function requestOf(values: Readonly<Record<string, string>>) {
	const read = readMappingForm(values, preview);
	if (read.status === 'wrong') throw new Error(JSON.stringify(read.errors));
	return read.request;
}

function errorsOf(values: Readonly<Record<string, string>>) {
	const read = readMappingForm(values, preview);
	return read.status === 'wrong' ? read.errors : {};
}

describe('the mapping form', () => {
	it('is prefilled with what was recognised and leaves the unit that was not open', () => {
		expect(recognised).toMatchObject({
			'column-0-meaning': 'lot',
			'column-2-unit': '°C',
			'column-4-meaning': 'capacitance',
			'column-4-unit': '',
			biasSign: 'reversePositive'
		});
		expect(errorsOf(recognised)).toEqual({ [unit]: [measurementMessages.unitMissing('C')] });
	});

	it('reads the set-up from handy units without error', () => {
		const { setup } = requestOf({
			...recognised,
			[unit]: 'pF',
			signalLevelMillivolts: '50',
			frequencyMegahertz: '0.1',
			temperatureCelsius: '-40',
			uncertaintyPercent: '0.3',
			waferLots: ' A1 = W7 \n\nA2=W7',
			instrument: ' bridge '
		});
		expect(setup).toMatchObject({
			signalLevelVolts: 0.05,
			frequencyHertz: 100_000,
			temperatureCelsius: -40,
			uncertainty: 0.003,
			waferLots: [
				{ lot: 'A1', waferLot: 'W7' },
				{ lot: 'A2', waferLot: 'W7' }
			],
			instrument: 'bridge'
		});
	});

	it('shows what was confirmed the way it was typed', () => {
		const values = {
			...recognised,
			[unit]: 'pF',
			frequencyMegahertz: '0.1',
			uncertaintyPercent: '0.3',
			signalLevelMillivolts: '50'
		};
		const mapped = completeMapping(preview, requestOf(values));
		if (mapped.status !== 'complete') throw new Error(mapped.messages.join(' '));
		expect(mappingValues(preview, mapped)).toMatchObject(values);
	});

	it.each([
		['signalLevelMillivolts', '0'],
		['frequencyMegahertz', '1 MHz'],
		['temperatureCelsius', '-300'],
		['uncertaintyPercent', '100']
	] as const)('refuses %s of %s beside the field', (field, text) => {
		expect(errorsOf({ ...recognised, [unit]: 'pF', [field]: text })).toEqual({
			[field]: [measurementMessages.setupNumber(field)]
		});
	});

	it('refuses wafer lots that are no pairs, and a sign that was not chosen', () => {
		expect(errorsOf({ ...recognised, [unit]: 'pF', waferLots: 'A1', biasSign: '' })).toEqual({
			waferLots: [measurementMessages.waferLotLines()],
			biasSign: [measurementMessages.biasSignMissing()]
		});
	});

	it('takes the number of lines that a person agreed to leave out', () => {
		expect(requestOf({ ...recognised, [unit]: 'pF', skipLines: '12' }).skipLines).toBe(12);
	});
});

describe('the mapping form of readings', () => {
	const readings = previewUpload(
		'lot,device,parameter,T [C],V_R [V],value,unit\nA,D1,I_R,25,,1.5,nA\nA,D1,I_R,25,,1.25,nA\n',
		{ encoding: 'utf-8', lineCount: 3 }
	);
	if (readings.status !== 'read') throw new Error(readings.status);
	const values = mappingValues(readings.preview, null);
	const read = (said: Readonly<Record<string, string>>) =>
		readMappingForm({ ...values, ...said }, readings.preview);
	const valueUnit = columnField(5, 'unit');

	it('leaves the unit to the lines when a column states it, and asks for it otherwise', () => {
		const outcome = read({ biasSign: 'reversePositive' });
		expect(outcome.status === 'read' && outcome.request.columns?.[5]).toEqual({
			header: 'value',
			meaning: 'value',
			unit: null
		});
		expect(read({ biasSign: 'reversePositive', [columnField(6, 'meaning')]: 'ignore' })).toEqual({
			status: 'wrong',
			errors: { [valueUnit]: [measurementMessages.unitMissing('value')] }
		});
	});

	it('asks for the sign of a reverse bias only where there is a bias', () => {
		expect(read({})).toEqual({
			status: 'wrong',
			errors: { biasSign: [measurementMessages.biasSignMissing()] }
		});
		expect(read({ [columnField(4, 'meaning')]: 'ignore' }).status).toBe('read');
	});
});
