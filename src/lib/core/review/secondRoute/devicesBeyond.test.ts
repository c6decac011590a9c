import { describe, expect, it } from 'vitest';
import { allowedOutside, countOutside, listOutside, lotRanges } from './devicesBeyond';
import { recompute } from './recompute';

const device = (lot: string, value: number, name = '1') => ({
	lot,
	waferLot: lot,
	wafer: '01',
	device: name,
	value
});

describe('how many devices a basis allows beyond one limit', () => {
	// R: qbinom(0.95, n, share), with the share that a limit of that kind leaves outside
	it.each([
		['tested', 300, 0.03595859787, 0],
		['characterized', 300, 0.03595859787, 16],
		['characterized', 300, 0.005214883615, 4],
		['sample-tested', 417, 0.03586861601, 21],
		['correlation', 33_000, 0.009456022249, 341],
		['typical', 300, 0.03595859787, null]
	] as const)('%s, %i devices, a share of %f', (basis, devices, share, allowed) => {
		expect(allowedOutside(basis, devices, { share, confidence: 0.95 })).toBe(allowed);
	});

	// limits.md §6: at P = 0.95, γ = 0.95, n = 300 about eleven are expected.
	// SciPy: k = nct.ppf(0.95, 299, norm.ppf(0.95)*sqrt(300))/sqrt(300); 300*norm.cdf(-k) = 10.788…
	it('and how many a limit of that kind leaves outside on average', () => {
		const devices = Array.from({ length: 300 }, (_, i) => device('A', 1 + i / 1000));
		const again = recompute(
			devices,
			{
				name: 'n',
				method: 'normal',
				content: 0.95,
				confidence: 0.95,
				tails: 'each',
				span: 'each-bias',
				minimumLots: 1,
				minimumDevices: 2,
				drift: 0,
				uncertaintyTreatment: 'outwards',
				resolution: { significantFigures: 3 }
			},
			{ isShared: false, uncertainty: 0 }
		);
		if (again.status === 'refused') throw new Error(again.reason);
		expect(300 * again.limits.shareOutside).toBeCloseTo(10.787579361083417, 6);
	});
});

it('does not count a value that prints as the limit itself', () => {
	const limits = { minimum: 12.5e-12, maximum: null };
	const atTheLimit = [device('A', 12.5 * 1e-12), device('A', 12.499 * 1e-12)];
	expect(countOutside(atTheLimit, 'minimum', limits, { allowed: 0, share: 0.01 })).toEqual({
		count: 1,
		allowed: 0,
		expected: 0.02
	});
});

it('lists devices beyond either limit, furthest out first, in the unit of the row', () => {
	const devices = [device('A', 9e-12, 'a'), device('B', 10.5e-12, 'b'), device('B', 12e-12, 'c')];
	const listed = listOutside(devices, { minimum: 10e-12, maximum: 11e-12 }, 1e-12);
	expect(listed.map(({ device: name, side }) => [name, side])).toEqual([
		['a', 'minimum'],
		['c', 'maximum']
	]);
	expect(listed[0]?.value).toBeCloseTo(9, 12);
	expect(listed[0]?.beyondPercent).toBeCloseTo(-10, 10);
	expect(listed[1]?.beyondPercent).toBeCloseTo(100 / 11, 10);
});

it('gives the range of each lot, by name', () => {
	const devices = [
		device('B', 5e-12),
		device('A', 1e-12),
		device('A', 2e-12),
		device('A', 3e-12),
		device('A', 4e-12),
		device('A', 9e-12)
	];
	const [a, b] = lotRanges(devices, { minimum: null, maximum: 8e-12 }, 1e-12);
	expect([a?.lot, a?.devices, b?.lot, b?.devices]).toEqual(['A', 5, 'B', 1]);
	const { lowest, lowerQuartile, median, upperQuartile, highest } = a ?? {};
	[1, 2, 3, 4, 9].forEach((value, place) =>
		expect([lowest, lowerQuartile, median, upperQuartile, highest][place]).toBeCloseTo(value, 10)
	);
	expect(a?.outside).toHaveLength(1);
});
