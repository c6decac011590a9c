import { describe, expect, it } from 'vitest';
import { modelCapacitance, type CapacitanceModel } from '../junction/capacitanceModel';
import { summarizeFits } from './summarizeFits';

const BIASES = [0, 0.5, 1, 2, 4, 8, 16, 28];
const law = (zeroBias: number, gradingExponent: number): CapacitanceModel => ({
	zeroBiasCapacitance: zeroBias * 1e-12,
	junctionPotential: 0.8,
	gradingExponent,
	caseCapacitance: 0.4e-12
});
const index = {
	groups: [
		{ lot: 'A', waferLot: 'WA', wafer: '01' },
		{ lot: 'B', waferLot: 'WB', wafer: '07' }
	],
	groupOf: Int32Array.from([0, 0, 0, 1, 1])
};
const models = [law(10, 0.5), law(11, 0.52), law(12, 0.48), law(14, 0.5)];
/** Four devices on a law, and a fifth whose reading at 4 V is 10 % high; a sixth wasn't measured. */
const columns = (change: (bias: number, device: number) => number = () => 1) =>
	BIASES.map((bias) => ({
		bias,
		sets: [1],
		values: Float64Array.from(
			[...models, law(13, 0.5)].map(
				(model, device) =>
					modelCapacitance(model, bias) *
					(device === 4 && bias === 4 ? 1.1 : 1) *
					change(bias, device)
			)
		)
	}));
const nameOf = (device: number) => `device ${device}`;

const quantileOf = (
	name: string,
	probability: number,
	of = summarizeFits(columns(), index, nameOf)
) =>
	of?.parameters
		.find((each) => each.name === name)
		?.quantiles.find((each) => each.probability === probability)?.value;

describe('the fits of a condition, summed up', () => {
	it('find the law of each device again', () => {
		// The laws the readings were made of: smallest C_j0 10 pF, largest M 0.52.
		expect((quantileOf('zeroBiasCapacitance', 0) ?? 0) * 1e12).toBeCloseTo(10, 5);
		expect(quantileOf('gradingExponent', 1)).toBeCloseTo(0.52, 5);
	});

	it('give the median of each independent lot', () => {
		const found = summarizeFits(columns(), index, nameOf);
		const lots = found?.parameters[0]?.lots ?? [];
		expect(lots.map(({ name }) => name)).toEqual(['WA', 'WB']);
		expect((lots[0]?.median ?? 0) * 1e12).toBeCloseTo(11, 5);
	});

	it('put the device with the reading that is off first', () => {
		const worst = summarizeFits(columns(), index, nameOf)?.worst ?? [];
		expect(worst[0]).toMatchObject({ device: 4, lot: 'B', wafer: '07', name: 'device 4' });
		// One of eight readings 10 % off leaves, after the fit, between 1 % and 10 %/√8 = 3.5 % rms.
		expect(worst[0]?.residualRms).toBeGreaterThan(0.01);
		expect(worst[0]?.residualRms).toBeLessThan(0.0354);
		expect(worst[1]?.residualRms).toBeLessThan(1e-4);
	});

	it('count a device with too few readings, and keep it out of the parameters', () => {
		const found = summarizeFits(
			columns((bias, device) => (device === 3 && bias > 1 ? Number.NaN : 1)),
			index,
			nameOf
		);
		expect(found).toMatchObject({ devices: 5, tooFewReadings: 1 });
		const bars = found?.parameters[0]?.bars ?? [];
		expect(bars.reduce((sum, { count }) => sum + count, 0)).toBe(4);
		expect((quantileOf('zeroBiasCapacitance', 1, found) ?? 0) * 1e12).toBeLessThan(13.9);
	});

	it('count a device whose readings do not tell the parameters apart', () => {
		const flat = columns().map((column) => ({
			...column,
			values: column.values.map((value, device) => (device === 0 ? 5e-12 : value))
		}));
		const found = summarizeFits(flat, index, nameOf);
		expect((found?.notIdentifiable ?? 0) + (found?.parameters[3]?.atBound ?? 0)).toBeGreaterThan(0);
		expect(found?.devices).toBe(5);
	});

	it('take the median sweep of all and of each lot, bias by bias', () => {
		const found = summarizeFits(columns(), index, nameOf);
		// Medians at 0 V, case included: 10.4, 11.4, 12.4, 13.4, 14.4 pF.
		expect((found?.all.capacitances[0] ?? 0) * 1e12).toBeCloseTo(12.4, 10);
		expect((found?.lots[1]?.capacitances[0] ?? 0) * 1e12).toBeCloseTo(13.9, 10);
		expect(found?.lots.map(({ devices }) => devices)).toEqual([3, 2]);
	});

	it.each([
		['three biases', columns().slice(0, 3)],
		['no readings', columns(() => Number.NaN)],
		['biases forward of any junction', [{ ...columns()[0]!, bias: -25 }, ...columns()]]
	])('are none for %s', (_, of) => {
		expect(summarizeFits(of, index, nameOf)).toBeUndefined();
	});
});
