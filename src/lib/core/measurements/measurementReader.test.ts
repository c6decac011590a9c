import { describe, expect, it } from 'vitest';
import { measurementMessages } from '../messages/measurements';
import { exportHeader, exportLines } from './exportLines';
import { MeasurementReader } from './measurementReader';
import { previewUpload } from './preview';
import { completeMapping, requestedMapping } from './requestedMapping';
import { MOST_BIASES, MOST_CONDITIONS } from './sweepTable';

/** Reads a text as recognised, in pieces of so many bytes. */
function read(text: string, { pieces = 1 << 20, said = {} } = {}) {
	const bytes = new TextEncoder().encode(text);
	const outcome = previewUpload(new TextDecoder().decode(bytes), {
		encoding: 'utf-8',
		lineCount: 0
	});
	if (outcome.status !== 'read') throw new Error(outcome.status);
	const mapped = completeMapping(outcome.preview, requestedMapping.parse(said));
	if (mapped.status !== 'complete') throw new Error(mapped.messages.join(' '));
	const reader = new MeasurementReader(mapped.mapping, mapped.setup);
	for (let at = 0; at < bytes.length; at += pieces) reader.push(bytes.subarray(at, at + pieces));
	reader.end();
	return reader;
}

const HEADER = 'lot,wafer,site,element,device,T [C],f [Hz],V [V],C [pF]';
const TEXT = `${HEADER}
A,1,X1,a,D1,25,1000000,0,38.5
A,1,X1,a,D1,25,1000000,4,13.75

A,1,X1,b,D1,25,1000000,0,38.625
A,1,X1,b,D1,25,1000000,4,13.875
A,2,X1,a,D1,-40,1000000,0,37.125`;

/** Everything that was read, by device, condition and column. */
const contents = ({ table }: MeasurementReader) => ({
	devices: table.devices,
	conditions: table.conditions().map((condition) => ({
		key: condition.key,
		biases: condition.biases,
		values: Array.from(condition.matrix(0, table.deviceCount) ?? [])
	}))
});

describe('reading', () => {
	it('gathers sweeps by condition and device, elements apart', () => {
		expect(contents(read(TEXT))).toEqual({
			devices: {
				lot: ['A', 'A', 'A'],
				wafer: ['1', '1', '2'],
				site: ['X1', 'X1', 'X1'],
				element: ['a', 'b', 'a'],
				name: ['D1', 'D1', 'D1']
			},
			conditions: [
				{ key: 'T=-40;f=1000000', biases: [0], values: [Number.NaN, Number.NaN, 37.125] },
				{
					key: 'T=25;f=1000000',
					biases: [0, 4],
					values: [38.5, 13.75, 38.625, 13.875, Number.NaN, Number.NaN]
				}
			]
		});
	});

	it('gives the same wherever the bytes are cut, and with any line end', () => {
		const whole = contents(read(TEXT));
		for (const pieces of [1, 2, 3, 7, 64, 100]) {
			expect(contents(read(TEXT, { pieces }))).toEqual(whole);
		}
		expect(contents(read(TEXT.replaceAll('\n', '\r\n')))).toEqual(whole);
		expect(contents(read(`\ufeff${TEXT}\n`))).toEqual(whole);
	});

	it('numbers problems by the lines of the file, blank ones counted', () => {
		const { problems } = read(`${TEXT}\nA,2,X1,a,D1,-40,1000000,4,?\n`, { pieces: 5 });
		expect(problems.lines).toEqual([
			{
				line: 8,
				read: 'A,2,X1,a,D1,-40,1000000,4,?',
				message: measurementMessages.notANumber('capacitance', '?')
			}
		]);
	});

	it('keeps the first 200 problems and counts all', () => {
		const bad = Array.from({ length: 300 }, () => 'A,1,X1,a,D1,25,1000000,0,0').join('\n');
		const { problems } = read(`${TEXT}\n${bad}`);
		expect([problems.total, problems.lines.length]).toEqual([300, 200]);
	});

	it('keeps repeated biases apart, in the order in which they were swept', () => {
		const line = (bias: number, value: number) => `A,1,,,D1,25,1e6,${bias},${value}`;
		const text = [HEADER, line(0, 40), line(4, 14), line(10, 5), line(4, 14.5), line(0, 41)];
		expect(contents(read(text.join('\n'))).conditions[0]).toMatchObject({
			biases: [0, 4, 10, 4, 0],
			values: [40, 14, 5, 14.5, 41]
		});
	});

	it('counts comments and reads none of them', () => {
		const reader = read(`# bench\n${TEXT}\n# A,1,X1,a,D1,25,1000000,10,5\n`);
		expect(reader.comments).toBe(1);
		expect(reader.table.conditions()[1]?.points).toBe(4);
	});

	it('takes temperature and frequency from the set-up where the file has none', () => {
		const { table } = read('lot,device,V [V],C [pF]\nA,D1,0,38\nA,D1,4,13\n', {
			said: { setup: { temperatureCelsius: 25, frequencyHertz: 1e6 } }
		});
		expect(table.conditions().map(({ key }) => key)).toEqual(['T=25;f=1000000']);
	});

	it('says which wafer lot a lot is from, and refuses two', () => {
		const text =
			'lot,wafer lot,device,T [C],f [Hz],V [V],C [pF]\nA,W1,D1,25,1e6,0,38\nA,W1,D1,25,1e6,4,13\n';
		expect(read(text).waferLotOf).toEqual(new Map([['A', 'W1']]));
		expect(read(`${text}A,W2,D2,25,1e6,0,38\n`).problems.lines[0]?.message).toBe(
			measurementMessages.waferLotTwice('A', 'W1', 'W2')
		);
	});

	it('refuses biases and temperatures that never come again', () => {
		const biases = Array.from(
			{ length: MOST_BIASES + 1 },
			(_, index) => `A,1,,,D1,25,1e6,${index},${2000 - index}`
		);
		expect(read([HEADER, ...biases].join('\n')).refusal).toBe(
			measurementMessages.tooManyBiases(MOST_BIASES, 25)
		);
		const temperatures = Array.from({ length: MOST_CONDITIONS + 1 }, (_, index) =>
			[0, 1].map((bias) => `A,1,,,D1,${index},1e6,${bias},${40 - bias}`)
		).flat();
		expect(read([HEADER, ...temperatures].join('\n')).refusal).toBe(
			measurementMessages.tooManyConditions(MOST_CONDITIONS)
		);
	});

	it('holds more than one chunk of devices', () => {
		const lines = Array.from({ length: 2100 }, (_, index) =>
			[0, 4].map(
				(bias) => `A,1,,,D${index},25,1e6,${bias},${(40 + index / 1000 - bias).toFixed(3)}`
			)
		).flat();
		const { table } = read([HEADER, ...lines].join('\n'));
		const [condition] = table.conditions();
		expect(table.deviceCount).toBe(2100);
		expect(condition?.value(2099, 0)).toBe(42.099);
		expect(condition?.matrix(1, 52)?.length).toBe(104);
		expect(condition?.matrix(1, 52)?.at(-2)).toBe(42.099);
	});
});

describe('an exported set', () => {
	it('reads back to the same names and numbers', () => {
		const first = read(TEXT.replaceAll('X1', '"X 1, left"').replace('38.5', '38.5000000000001'));
		const lines = first.table.conditions().flatMap((condition) => [
			...exportLines({
				temperatureCelsius: condition.temperatureCelsius,
				frequency: condition.frequency,
				devices: first.table.devices,
				biases: condition.biases,
				values: condition.matrix(0, first.table.deviceCount) ?? new Float64Array(0)
			})
		]);
		const again = read([exportHeader(1e-12), ...lines].join('\n'));
		const asSets = (reader: MeasurementReader) =>
			contents(reader).conditions.map(({ key, biases, values }) => ({
				key,
				biases,
				values: values.filter((value) => !Number.isNaN(value)).sort((a, b) => a - b)
			}));
		expect(asSets(again)).toEqual(asSets(first));
		expect(new Set(again.table.devices.site)).toEqual(new Set(['X 1, left']));
	});

	it('names the unit of the uploaded file', () => {
		expect(exportHeader(1e-9)).toContain('capacitance_nF');
		expect(exportHeader(1e-6)).toContain('capacitance_uF');
	});
});
