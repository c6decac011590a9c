import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { measurementMessages } from '../messages/measurements';
import { previewUpload } from './preview';
import { ReadingsReader } from './readingsReader';
import { MOST_REPEATS, MOST_SERIES } from './readingTable';
import { completeMapping, requestedMapping } from './requestedMapping';

const HEADER = 'lot,wafer,device,characteristic,T [C],V_R [V],I_F [A],value,unit,censored';

/** Reads a text as its head is recognised, in pieces of so many bytes. */
function read(text: string, { pieces = 1 << 20, head = text } = {}) {
	const bytes = new TextEncoder().encode(text);
	const outcome = previewUpload(head, { encoding: 'utf-8', lineCount: 0 });
	if (outcome.status !== 'read') throw new Error(outcome.status);
	const mapped = completeMapping(outcome.preview, requestedMapping.parse({}));
	if (mapped.status !== 'complete') throw new Error(mapped.messages.join(' '));
	const reader = new ReadingsReader(mapped.mapping, mapped.setup);
	for (let at = 0; at < bytes.length; at += pieces) reader.push(bytes.subarray(at, at + pieces));
	reader.end();
	return reader;
}

const TEXT = `${HEADER}
A,1,D1,I_R,25,60,,12.5,nA,
A,1,D1,V_F,25,,2,0.512,V,

A,1,D2,I_R,25,60,,<0.1,nA,
A,1,D2,I_R,85,60,,3.25,nA,
`;

const contents = ({ table }: ReadingsReader) =>
	table.series().map((series) => ({
		of: `${series.characteristic.key} ${series.key} ${series.unit.symbol}`,
		readings: table.devices.columns.name.map((_, device) => series.of(device))
	}));
const NONE = { value: Number.NaN, censored: 0 };

describe('reading', () => {
	it('gathers readings by characteristic and condition, wherever the bytes are cut', () => {
		const expected = [
			{
				of: 'I_R T=25;VR=60 nA',
				readings: [
					{ value: 12.5, censored: 0 },
					{ value: 0.1, censored: -1 }
				]
			},
			{ of: 'I_R T=85;VR=60 nA', readings: [NONE, { value: 3.25, censored: 0 }] },
			{ of: 'V_F T=25;IF=2 V', readings: [{ value: 0.512, censored: 0 }, NONE] }
		];
		for (const pieces of [1, 7, 64, 1 << 20])
			expect(contents(read(TEXT, { pieces }))).toEqual(expected);
		expect(contents(read(TEXT.replaceAll('\n', '\r\n')))).toEqual(expected);
	});

	it('numbers problems by the lines of the file', () => {
		const { problems } = read(`${TEXT}A,1,D3,I_R,25,60,,0,nA,\n`);
		expect(problems.lines).toEqual([
			{ line: 7, read: 'A,1,D3,I_R,25,60,,0,nA,', message: measurementMessages.readingZero('I_R') }
		]);
	});

	it('keeps repeats apart and averages them as one', () => {
		const { table } = read(
			`${TEXT}A,1,D1,I_R,25,60,,13.5,nA,\nA,1,D2,I_R,25,60,,0.3,nA,\nA,1,D2,I_R,25,60,,0.2,nA,\n`
		);
		const [series] = table.series();
		expect([0, 1, 2].map((repeat) => series?.at(1, repeat))).toEqual([
			{ value: 0.1, censored: -1 },
			{ value: 0.3, censored: 0 },
			{ value: 0.2, censored: 0 }
		]);
		expect(series?.of(0)).toEqual({ value: 13, censored: 0 });
		expect(series?.of(1).value).toBeCloseTo(0.2, 12);
		expect(series?.of(1).censored).toBe(-1);
		expect([series?.readings, series?.censoredReadings]).toEqual([5, 1]);
	});

	it('refuses another unit at one condition, and bounds that contradict each other', () => {
		const { problems } = read(
			`${TEXT}A,1,D3,I_R,25,60,,0.01,µA,\nA,1,D2,I_R,25,60,,>5,nA,\nA,1,D3,I_R,85,60,,0.01,µA,\n`
		);
		expect(problems.lines.map(({ line, message }) => [line, message])).toEqual([
			[7, measurementMessages.unitDiffers('I_R', 'nA', 'µA')],
			[8, measurementMessages.boundsContradict('I_R', 'D2')],
			[9, measurementMessages.unitDiffers('I_R', 'nA', 'µA')]
		]);
	});

	it('refuses measured conditions for set ones, and endless repeats', () => {
		const many = (count: number, line: (index: number) => string) =>
			read(`${HEADER}\n${Array.from({ length: count }, (_, i) => line(i)).join('\n')}\n`).refusal;
		const swept = (i: number) => `A,1,D1,I_R,25,${60 + i / 1000},,1.5,nA,`;
		expect(many(MOST_SERIES, swept)).toBeUndefined();
		expect(many(MOST_SERIES + 1, swept)).toBe(measurementMessages.tooManySeries(MOST_SERIES));
		const again = () => 'A,1,D1,I_R,25,60,,1.5,nA,';
		expect(many(MOST_REPEATS, again)).toBeUndefined();
		expect(many(MOST_REPEATS + 1, again)).toBe(
			measurementMessages.tooManyRepeats(MOST_REPEATS, 'I_R')
		);
	});

	it('says which wafer lot a lot is from, and refuses two', () => {
		const text = TEXT.replace(HEADER, HEADER.replace('wafer', 'wafer lot'));
		expect(read(text).waferLotOf).toEqual(new Map([['A', '1']]));
		expect(read(`${text}A,2,D1,V_F,25,,2,0.5,V,\n`).problems.lines[0]?.message).toBe(
			measurementMessages.waferLotTwice('A', '1', '2')
		);
	});

	it('loses no line silently', () => {
		const line = fc.oneof(
			fc.constantFrom(
				'A,1,D7,I_R,25,60,,1.25,nA,',
				'A,1,D8,V_F,25,,2,0.5,V,>',
				'A,1,D9,I_R,85,60,,<0.5,nA,'
			),
			fc.constantFrom('', '  ', '# paused'),
			fc.string({ maxLength: 40 }).map((text) => text.replace(/[\r\n]/g, ''))
		);
		fc.assert(
			fc.property(
				fc.array(line, { maxLength: 30 }),
				fc.integer({ min: 1, max: 50 }),
				(lines, pieces) => {
					const head = `# probe 4\n${TEXT}`;
					const text = `${head}${lines.join('\n')}`;
					const { table, problems, comments } = read(text, { pieces, head });
					const taken = table.series().reduce((sum, { readings }) => sum + readings, 0);
					const blank = text.split('\n').filter((of) => of.trim() === '').length;
					expect(taken + problems.total + comments + blank).toBe(text.split('\n').length - 2);
				}
			)
		);
	});
});

describe('the mapping of readings', () => {
	const problemsOf = (header: string, row: string) => {
		const outcome = previewUpload(`${header}\n${row}\n${row}\n`, {
			encoding: 'utf-8',
			lineCount: 3
		});
		if (outcome.status !== 'read') throw new Error(outcome.status);
		const mapped = completeMapping(outcome.preview, requestedMapping.parse({}));
		return mapped.status === 'complete' ? [] : mapped.messages;
	};

	it('needs no bias, no frequency and no sign of a reverse bias', () => {
		expect(problemsOf('lot,device,parameter,T [C],value [K/W]', 'A,D1,Rth(j-mb),25,1.25')).toEqual(
			[]
		);
	});

	it.each([
		[
			'lot,device,parameter,T [C],value',
			'A,D1,I_R,25,1.25',
			[measurementMessages.unitMissing('value')]
		],
		[
			'lot,device,T [C],value [nA]',
			'A,D1,25,1.25',
			[measurementMessages.columnMissing('characteristic')]
		],
		['lot,device,parameter,value [V]', 'A,D1,V_F,1.25', [measurementMessages.temperatureMissing()]],
		[
			'lot,device,parameter,T [C],value [V],unit',
			'A,D1,V_F,25,1.25,mV',
			[measurementMessages.unitTwice('value [V]')]
		],
		[
			'lot,device,parameter,T [C],V_R [V],value [V],C [pF],f [Hz]',
			'A,D1,V_F,25,3,1.25,3,1',
			[measurementMessages.contentTwice(), measurementMessages.biasSignMissing()]
		],
		[
			'lot,device,T [C],f [Hz],V_R [V],x',
			'A,D1,25,1,4,3',
			[measurementMessages.nothingMeasured(), measurementMessages.biasSignMissing()]
		]
	])('of %s is refused', (header, row, messages) => {
		expect(problemsOf(header, row)).toEqual(messages);
	});
});
