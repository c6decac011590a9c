import { expect, it } from 'vitest';
import { computeDistribution } from '../distributions/computeDistribution';
import type { Distribution } from '../distributions/summary';
import { normalQuantile } from '../stats/normalQuantile';
import { computeLimitRow } from './computeLimitRow';
import type { LimitPolicy } from './policy';

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
	minimumLots: 3,
	minimumDevices: 30,
	drift: 0,
	resolution: { step: 0.1 }
};

const row = computeLimitRow(threeLots(), rules, {
	policyVersion: 1,
	condition: { temperatureCelsius: 25, frequency: 1e6, reverseVoltage: 4 },
	unit: 'pF',
	unitScale: 1e-12,
	inputHash: 'worked-case'
});

const step = (name: string) => row.minimum?.derivation.find((line) => line.name === name);

// SciPy 1.10.1: scipy.stats.nct.ppf(0.975, 74, norm.ppf(0.99)*sqrt(75))/sqrt(75)
it('takes k₁ = 2.838 for 75 devices, content 0.99 and a confidence of 0.975 a side', () => {
	expect(step('Factor k₁')?.value).toBeCloseTo(2.838, 3);
});

it('finds the raw limits 14.238 and 15.801 pF and prints 14.2 and 15.9', () => {
	expect((row.minimum?.raw ?? 0) / 1e-12).toBeCloseTo(14.238, 3);
	expect((row.maximum?.raw ?? 0) / 1e-12).toBeCloseTo(15.801, 3);
	expect([row.minimum?.text, row.typical?.text, row.maximum?.text]).toEqual([
		'14.2',
		'15.0',
		'15.9'
	]);
	expect(row.minimum?.printed).toBe(1.42e-11);
	expect(row.refusals).toEqual([]);
});

it('warns that the lots differ, with F = 19.95', () => {
	expect(step('Lots compared, F')?.text).toBe('19.95');
	expect(row.warnings.join(' ')).toContain('F\u00a0=\u00a019.95');
});
