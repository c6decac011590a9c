import { describe, expect, it } from 'vitest';
import { measurementMessages } from '../messages/measurements';
import { exportHeader, exportLines } from './exportLines';
import { MeasurementReader } from './measurementReader';
import { previewUpload } from './preview';
import { completeMapping, requestedMapping } from './requestedMapping';
import { findSuspects } from './suspects';

const HEADER = 'lot,device,T [C],V [V],I [mA]';
const TEXT = `${HEADER}
A,D1,25,-5,-0.0002
A,D1,25,0,0
A,D1,25,0.4,12.5
A,D2,25,-5,-0.00025
A,D2,25,0.4,12.75
`;

const preview = (text: string) => {
	const outcome = previewUpload(text, { encoding: 'utf-8', lineCount: 0 });
	if (outcome.status !== 'read') throw new Error(outcome.status);
	return outcome.preview;
};

function read(text: string) {
	const mapped = completeMapping(preview(text), requestedMapping.parse({}));
	if (mapped.status !== 'complete') throw new Error(mapped.messages.join(' '));
	const reader = new MeasurementReader(mapped.mapping, mapped.setup);
	reader.push(new TextEncoder().encode(text));
	reader.end();
	return reader;
}

describe('a file of I–V sweeps', () => {
	it('is recognised by its current; the larger one flows forward', () => {
		expect(preview(TEXT)).toMatchObject({ biasSign: 'reverseNegative' });
		expect(preview(TEXT).columns.map(({ meaning, unit }) => [meaning, unit])).toEqual([
			['lot', null],
			['device', null],
			['temperature', '°C'],
			['bias', 'V'],
			['current', 'mA']
		]);
		expect(preview('lot,device,V_R [V],I_R [nA]\nA,D1,5,0.2\nA,D1,10,0.3\n')).toMatchObject({
			biasSign: null,
			columns: [{}, {}, { meaning: 'bias' }, { meaning: 'current', unit: 'nA' }]
		});
	});

	it('is stored at its temperature, bias and current reverse positive, a zero too', () => {
		const [condition] = read(TEXT).table.conditions();
		expect([condition?.key, condition?.quantity, condition?.biases]).toEqual([
			'T=25',
			'current',
			[5, 0, -0.4]
		]);
		expect(Array.from(condition?.matrix(0, 2) ?? [])).toEqual([
			0.0002,
			0,
			-12.5,
			0.00025,
			Number.NaN,
			-12.75
		]);
	});

	it('refuses what is no number and what marks an overflow', () => {
		const { problems } = read(`${TEXT}A,D3,25,0.4,open\nA,D3,25,0.4,9.9e37\n`);
		expect(problems.lines.map(({ line, message }) => [line, message])).toEqual([
			[7, measurementMessages.notANumber('current', 'open')],
			[8, measurementMessages.currentOverflow('9.9e37')]
		]);
	});

	it('comes back in its own unit', () => {
		const reader = read(TEXT);
		const [condition] = reader.table.conditions();
		if (condition === undefined) throw new Error('no sweeps');
		expect(exportHeader(1e-3, 'current')).toBe(
			'lot,wafer,site,element,device,temperature_C,bias_V,current_mA'
		);
		expect([
			...exportLines({
				...condition,
				frequency: undefined,
				temperatureCelsius: 25,
				devices: reader.table.devices,
				biases: condition.biases,
				values: condition.matrix(0, 2) ?? new Float64Array()
			})
		]).toEqual([
			'A,,,,D1,25,5,0.0002',
			'A,,,,D1,25,0,0',
			'A,,,,D1,25,-0.4,-12.5',
			'A,,,,D2,25,5,0.00025',
			'A,,,,D2,25,-0.4,-12.75'
		]);
	});

	it('finds a current unlike its lot, whatever its direction, and lets currents rise', () => {
		const lines = [1.1, 1.2, 1.3, 1.15, 1.25, 90].flatMap((current, device) => [
			`A,D${device},25,-5,-${current}`,
			`A,D${device},25,-10,-${current * 2}`,
			`A,D${device},25,0.4,5000`
		]);
		const { table } = read(`${HEADER}\n${lines.join('\n')}\n`);
		const [condition] = table.conditions();
		if (condition === undefined) throw new Error('no sweeps');
		const suspects = findSuspects(condition, table.devices.lot, undefined);
		expect(suspects.map(({ device, conditionKey }) => [device, conditionKey])).toEqual([
			[5, 'I T=25']
		]);
		expect(suspects[0]?.reason.text).toMatch(
			/^ln \|I\| lies .* above lot A at \d+ V; beyond 6 at 2 of 3 biases\.$/
		);
	});
});
