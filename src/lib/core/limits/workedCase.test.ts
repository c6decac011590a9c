import { describe, expect, it } from 'vitest';
import { computeDistribution } from '../distributions/computeDistribution';
import type { Distribution } from '../distributions/summary';
import { limitMessages } from '../messages/limits';
import { normalQuantile } from '../stats/normalQuantile';
import { computeLimitRow } from './computeLimitRow';
import type { LimitRow } from './limit';
import type { LimitPolicy } from './policy';
import { testLimit } from './testLimit';
import { testYield } from './testYield';

const MEDIANS = [14.8e-12, 15.0e-12, 15.2e-12];
const PER_LOT = 25;

/** Three lots of 25 devices at exact normal scores: C = m·exp(0.015·Φ⁻¹((j − 0.5)/25)). */
function threeLots(): Distribution {
	const values = MEDIANS.flatMap((median) =>
		Array.from(
			{ length: PER_LOT },
			(_, j) => median * Math.exp(0.015 * normalQuantile((j + 0.5) / PER_LOT))
		)
	);
	const distribution = computeDistribution({
		characteristic: 'C_tot',
		conditionKey: 'T=25;f=1000000;VR=4',
		unit: 'F',
		transform: 'ln',
		values: Float64Array.from(values),
		groupOf: Int32Array.from(values, (_, device) => Math.floor(device / PER_LOT)),
		groups: ['A', 'B', 'C'].map((lot) => ({ lot, waferLot: lot, wafer: '1' })),
		sets: [1],
		uncertainty: 0,
		excluded: 0,
		quarantined: 0
	});
	if (distribution === undefined) throw new Error('the worked case has devices');
	return distribution;
}

const rules: LimitPolicy = {
	name: 'Worked case',
	method: 'normal',
	content: 0.99,
	confidence: 0.95,
	tails: 'each',
	span: 'each-bias',
	minimumLots: 3,
	minimumDevices: 30,
	drift: 0,
	uncertaintyTreatment: 'outwards',
	resolution: { step: 0.1 }
};

const rowBy = (method: LimitPolicy['method']) =>
	computeLimitRow(
		threeLots(),
		{ ...rules, method },
		{
			policyVersion: 1,
			condition: { temperatureCelsius: 25, frequency: 1e6, reverseVoltage: 4 },
			unit: 'pF',
			unitScale: 1e-12,
			inputHash: 'worked-case'
		}
	);
const stepOf = (row: LimitRow, name: string) =>
	row.minimum?.derivation.find((line) => line.name === name);
const rawOf = (row: LimitRow) => [row.minimum, row.maximum].map((of) => (of?.raw ?? 0) / 1e-12);

describe('normal', () => {
	const row = rowBy('normal');

	// SciPy 1.10.1: scipy.stats.nct.ppf(0.975, 74, norm.ppf(0.99)*sqrt(75))/sqrt(75)
	it('takes k₁ = 2.838 for 75 devices, content 0.99 and a confidence of 0.975 a side', () => {
		expect(stepOf(row, 'Factor k₁')?.value).toBeCloseTo(2.838, 3);
	});

	it('finds the raw limits 14.238 and 15.801 pF and prints 14.2 and 15.9', () => {
		const [minimum, maximum] = rawOf(row);
		expect(minimum).toBeCloseTo(14.238, 3);
		expect(maximum).toBeCloseTo(15.801, 3);
		expect([row.minimum?.text, row.typical?.text, row.maximum?.text]).toEqual([
			'14.2',
			'15.0',
			'15.9'
		]);
		expect(row.minimum?.printed).toBe(1.42e-11);
		expect(row.refusals).toEqual([]);
	});

	it('warns that the lots differ, with F = 19.95', () => {
		expect(stepOf(row, 'Lots compared, F')?.text).toBe('19.95');
		expect(row.warnings.join(' ')).toContain('F\u00a0=\u00a019.95');
	});
});

describe('lots', () => {
	const row = rowBy('lots');

	// The worked case of the design: 12.233 and 18.391 pF for devices of future lots.
	it('finds the raw limits 12.233 and 18.391 pF', () => {
		const [minimum, maximum] = rawOf(row);
		expect(minimum).toBeCloseTo(12.233, 3);
		expect(maximum).toBeCloseTo(18.391, 3);
		expect([row.minimum?.text, row.maximum?.text]).toEqual(['12.2', '18.4']);
	});

	it('compares the lots without a warning, since their spread is part of the limit', () => {
		expect(stepOf(row, 'Lots compared, F')?.text).toBe('19.95');
		expect(row.warnings).toEqual([]);
	});
});

describe('order', () => {
	// ISO 16269-6, 0.99 at 0.975 a side: the smallest n with 1 − 0.99ⁿ ≥ 0.975 is 368.
	it('is refused, with the 368 devices needed a side', () => {
		const row = rowBy('order');
		expect([row.minimum, row.maximum]).toEqual([null, null]);
		expect(row.requiredSampleSize).toBe(368);
		expect(row.refusals).toEqual([limitMessages.orderNeedsMore(368, 75, 2)]);
	});
});

describe('tested on every device, printed 14.2 and 15.8 pF', () => {
	const tested = { ...rules, drift: 0.005, guardBand: 1 };
	const uncertainty = { absolute: 0.05e-12 };
	const of = (printed: number, side: 'minimum' | 'maximum') =>
		testLimit(printed, { side, rules: tested, uncertainty, unit: 'pF', unitScale: 1e-12 });

	// 14.2/0.995 + 0.05 = 14.3214 and 15.8/1.005 − 0.05 = 15.6714 pF, rounded inwards
	it('tests at 14.33 and 15.67 pF', () => {
		expect([of(14.2, 'minimum').text, of(15.8, 'maximum').text]).toEqual(['14.33', '15.67']);
	});

	it('passes 74 of the 75 stored devices', () => {
		const passed = testYield(threeLots(), {
			minimum: of(14.2, 'minimum').value,
			maximum: of(15.8, 'maximum').value
		});
		expect(passed).toMatchObject({ passed: 74, of: 75 });
		// Φ of both distances from the pooled mean: by hand (1.0 − 0.0083 − 0.0096)
		expect(passed.predicted).toBeCloseTo(0.982, 2);
	});
});
