import { describe, expect, it } from 'vitest';
import { MeasurementReader } from '$lib/core/measurements/measurementReader';
import { previewUpload } from '$lib/core/measurements/preview';
import { findReadingSuspects } from '$lib/core/measurements/readingSuspects';
import { ReadingsReader } from '$lib/core/measurements/readingsReader';
import { completeMapping, requestedMapping } from '$lib/core/measurements/requestedMapping';
import { findSuspects } from '$lib/core/measurements/suspects';
import { electricalFiles } from './demoFiles';

function openFile(fileName: string) {
	const file = electricalFiles().find((of) => of.fileName === fileName);
	if (file === undefined) throw new Error(fileName);
	const text = `${[...file.lines()].join('\n')}\n`;
	const outcome = previewUpload(text, { encoding: 'utf-8', lineCount: 0 });
	if (outcome.status !== 'read') throw new Error(outcome.status);
	const mapped = completeMapping(outcome.preview, requestedMapping.parse({}));
	if (mapped.status !== 'complete') throw new Error(mapped.messages.join(' '));
	return { text, ...mapped };
}

function readReadings(fileName: string) {
	const { text, mapping, setup } = openFile(fileName);
	const reader = new ReadingsReader(mapping, setup);
	reader.push(new TextEncoder().encode(text));
	reader.end();
	return reader;
}

/** The middle value of each series in its own unit, and how many devices and bounds it has. */
function summarize({ table }: ReadingsReader) {
	return table.series().map((series) => {
		const values = table.devices.columns.lot
			.map((_, device) => series.of(device).value)
			.filter((value) => !Number.isNaN(value))
			.sort((a, b) => a - b);
		return {
			of: `${series.characteristic.key} ${series.key}`,
			unit: series.unit.symbol,
			devices: values.length,
			median: values[Math.floor(values.length / 2)] ?? Number.NaN,
			bounds: series.censoredReadings
		};
	});
}

const suspectsOf = ({ table }: ReadingsReader) =>
	table
		.series()
		.flatMap((series) =>
			findReadingSuspects(series, table.devices.columns.lot).suspects.map(
				({ device, conditionKey }) =>
					`${table.devices.columns.lot[device]} ${table.devices.columns.name[device]} ${conditionKey}`
			)
		);

describe('the readings of the demo', () => {
	it('are read as they are recognised, and say what a tuning diode of this kind does', () => {
		const reader = readReadings('LKT-1130_readings.csv');
		expect(reader.problems.total).toBe(0);
		const found = summarize(reader);
		expect(found.map(({ of, unit, devices }) => [of, unit, devices])).toEqual([
			['I_R T=25;VR=28', 'nA', 800],
			['I_R T=85;VR=28', 'nA', 800],
			['V_(BR) T=25;IR=0.00001', 'V', 800],
			['V_F T=25;IF=0.01', 'V', 800],
			['r_s T=25;f=470000000;VR=4', 'Ω', 800]
		]);
		const [cold, hot, breakdown, forward, series] = found;
		expect(cold?.bounds).toBeGreaterThan(0);
		expect(cold?.bounds).toBeLessThan(30);
		// E = 0.6 eV from 25 °C to 85 °C: exp(0.6/8.617333e-5·(1/298.15 − 1/358.15)) = 50.
		expect((hot?.median ?? 0) / (cold?.median ?? 1)).toBeGreaterThan(45);
		expect((hot?.median ?? 0) / (cold?.median ?? 1)).toBeLessThan(55);
		expect(breakdown?.median).toBeGreaterThan(36);
		expect(forward?.median).toBeGreaterThan(0.8);
		expect(forward?.median).toBeLessThan(0.95);
		expect(series?.median).toBeGreaterThan(0.4);
		expect(suspectsOf(reader)).toEqual(['LK24-036 D008 V_F T=25;IF=0.01']);
	});

	it('say what a Schottky rectifier of this kind does', () => {
		const reader = readReadings('LKR-2406_readings.csv');
		expect(reader.problems.total).toBe(0);
		const found = summarize(reader);
		expect(found.map(({ of, unit, devices }) => [of, unit, devices])).toEqual([
			['I_R T=25;VR=60', 'µA', 800],
			['I_R T=125;VR=60', 'mA', 800],
			['R_th(j-mb) T=25', 'K/W', 96],
			['V_(BR) T=25;IR=0.001', 'V', 800],
			...[-40, 25, 125].flatMap((at) =>
				[0.5, 1, 2].map((current) => [`V_F T=${at};IF=${current}`, 'mV', 800])
			)
		]);
		const medianOf = (of: string) => found.find((entry) => entry.of === of)?.median ?? Number.NaN;
		const breakdown = found.find(({ of }) => of.startsWith('V_(BR)'));
		expect(breakdown?.bounds).toBeGreaterThan(0);
		expect(breakdown?.bounds).toBeLessThan(30);
		expect(medianOf('V_F T=25;IF=2')).toBeGreaterThan(450);
		expect(medianOf('V_F T=25;IF=2')).toBeLessThan(600);
		expect(medianOf('V_F T=125;IF=2')).toBeLessThan(medianOf('V_F T=25;IF=2'));
		expect(medianOf('V_F T=-40;IF=2')).toBeGreaterThan(medianOf('V_F T=25;IF=2'));
		expect(suspectsOf(reader)).toEqual([]);
	});

	it('are the same in every run', () => {
		expect(openFile('LKR-2406_readings.csv').text).toBe(openFile('LKR-2406_readings.csv').text);
		expect(openFile('LKT-1130_readings.csv').text.split('\n')[1]).toMatch(
			/^LK24-031,03,X1Y1,D001,r_s,25,470,4,,,0\.\d{3},Ω,$/
		);
	});
});

describe('the I–V sweeps of the demo', () => {
	it('are read as they are recognised, without a suspect', () => {
		const { text, mapping, setup } = openFile('LKR-2406_currents.csv');
		expect(mapping.biasSign).toBe('reverseNegative');
		const reader = new MeasurementReader(mapping, setup);
		reader.push(new TextEncoder().encode(text));
		reader.end();
		expect(reader.problems.total).toBe(0);
		const { table } = reader;
		expect(table.deviceCount).toBe(160);
		expect(table.conditions().map(({ key, biases }) => [key, biases.length])).toEqual([
			['T=25', 17],
			['T=125', 17]
		]);
		expect(
			table
				.conditions()
				.flatMap((condition) => findSuspects(condition, table.devices.lot, undefined))
		).toEqual([]);
	});
});
