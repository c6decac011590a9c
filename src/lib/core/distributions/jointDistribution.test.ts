import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { SampleTooSmallError, TooFewLotsError } from '../stats/errors';
import { lineFromMoments } from '../stats/regressionLine';
import { computeJointDistribution, type JointInput } from './computeJointDistribution';
import { PackedJointError } from './errors';
import { completeDevices, curveCovariance, momentsOfPair } from './jointDistribution';
import { packJoint, unpackJoint } from './packJoint';

/** Eleven devices of three lots at three biases, in pF. */
const LOT = [0, 0, 0, 0, 1, 1, 1, 2, 2, 2, 2];
const READINGS = [
	[18.2, 18.9, 17.6, 18.4, 19.3, 19.9, 19.1, 17.2, 17.9, 18.1, 17.4],
	[9.8, 10.1, 9.4, 9.9, 10.3, 10.8, 10.2, 9.3, 9.6, 9.9, 9.2],
	[4.91, 5.02, 4.8, 4.97, 5.11, 5.29, 5.15, 4.7, 4.84, 4.88, 4.62]
];
const BIASES = [0, 4, 20];

const input: JointInput = {
	characteristic: 'C_tot',
	conditionKey: 'T=25;f=1000000',
	unit: 'F',
	transform: 'ln',
	columns: BIASES.map((bias, column) => ({
		bias,
		values: Float64Array.from(READINGS[column] ?? [], (value) => value * 1e-12),
		sets: [1]
	})),
	groupOf: Int32Array.from(LOT),
	groups: ['A', 'B', 'C'].map((lot) => ({ lot, waferLot: lot, wafer: '1' }))
};
const joint = computeJointDistribution(input)!;

function expectClose(found: ArrayLike<number>, wanted: readonly number[], digits: number): void {
	expect(found).toHaveLength(wanted.length);
	for (const [i, value] of wanted.entries()) expect(found[i]).toBeCloseTo(value, digits);
}

describe('eleven devices of three lots at three biases', () => {
	// R 4.2.2: y <- log(cbind(c0, c4, c20) * 1e-12); m <- apply(y, 2, tapply, lot, mean)
	it('have the lot means R finds', () => {
		expect(joint.biases).toEqual(BIASES);
		expect(joint.lotSizes).toEqual([4, 3, 4]);
		expectClose(
			joint.lotMeans,
			[
				-24.7258128452267, -25.3489805519435, -26.0368362075454, -24.6641833950306,
				-25.2863285327099, -25.9856829943414, -24.760498055639, -25.3801421809714, -26.0710168273277
			],
			12
		);
	});

	// R: crossprod(y - m[lot, ]) / (11 - 3)
	it('have the covariance within lots R finds', () => {
		expectClose(
			joint.withinLots,
			[
				0.000652745234279331, 0.000767876998855759, 0.000498994104790344, 0.000767876998855759,
				0.000988813080650052, 0.000650132970654856, 0.000498994104790344, 0.000650132970654856,
				0.000465876085814664
			],
			15
		);
	});

	// R: cov(m); 1 / mean(1 / c(4, 3, 4))
	it('have the covariance of lot means R finds', () => {
		const curve = curveCovariance(joint)!;
		expectClose(
			curve.ofLotMeans,
			[
				0.00237962780015359, 0.00232961447523445, 0.00209283425953173, 0.00232961447523445,
				0.00228288720630987, 0.00204590901395159, 0.00209283425953173, 0.00204590901395159,
				0.00184447150699026
			],
			15
		);
		expect(curve).toMatchObject({ points: 3, lots: 3, withinDegrees: 8 });
		expect(curve.effectiveSize).toBeCloseTo(3.6, 12);
	});

	// R: colMeans(y); apply(y, 2, sd); cor(y)
	it('have the moments of two biases R finds', () => {
		const moments = momentsOfPair(joint, 20, 0)!;
		expect(moments.sampleSize).toBe(11);
		expect(moments.meanX).toBeCloseTo(-26.0353146475015, 12);
		expect(moments.meanY).toBeCloseTo(-24.7216176171413, 12);
		expect(moments.deviationX).toBeCloseTo(0.0402799637909235, 14);
		expect(moments.deviationY).toBeCloseTo(0.0460816506089519, 14);
		expect(moments.correlation).toBeCloseTo(0.976292309797071, 12);
	});

	// R: l <- lm(y[, 1] ~ y[, 3]); coef(l); summary(l)$sigma
	it('give the line of one bias on another that R fits', () => {
		const line = lineFromMoments(momentsOfPair(joint, 20, 0)!);
		expect(line.slope).toBeCloseTo(1.11691165726452, 11);
		expect(line.intercept).toBeCloseTo(4.35752881320295, 9);
		expect(line.residualDeviation).toBeCloseTo(0.0105142181650084, 13);
	});

	it('give the covariance of some of the biases', () => {
		const some = curveCovariance(joint, [20, 4])!;
		const all = curveCovariance(joint)!;
		expect(some.points).toBe(2);
		expect([...some.withinLots]).toEqual([8, 7, 5, 4].map((i) => joint.withinLots[i]));
		expectClose(
			some.ofLotMeans,
			[8, 7, 5, 4].map((i) => all.ofLotMeans[i]!),
			18
		);
	});

	it('say nothing of a bias that was not measured', () => {
		expect(momentsOfPair(joint, 4, 5)).toBeUndefined();
		expect(curveCovariance(joint, [0, 5])).toBeUndefined();
	});
});

it('takes devices with a value at every bias, and leaves out biases few devices have', () => {
	const holes = input.columns.map((column, c) => ({
		...column,
		values: column.values.map((value, device) => (c === 1 && device === 2 ? Number.NaN : value))
	}));
	const sparse = {
		bias: 30,
		sets: [2],
		values: Float64Array.from(LOT, (_, i) => (i < 5 ? 4e-12 : NaN))
	};
	const found = computeJointDistribution({ ...input, columns: [...holes, sparse] })!;
	expect(found.biases).toEqual(BIASES);
	expect(found.lotSizes).toEqual([3, 3, 4]);
	expect(completeDevices(found)).toBe(10);
});

it('is the same to the last bit in whatever order the devices come', () => {
	fc.assert(
		fc.property(fc.shuffledSubarray([...LOT.keys()], { minLength: 11 }), (order) => {
			const shuffled = computeJointDistribution({
				...input,
				groupOf: Int32Array.from(order, (device) => LOT[device] ?? -1),
				columns: input.columns.map((column) => ({
					...column,
					values: Float64Array.from(order, (device) => column.values[device] ?? NaN)
				}))
			});
			expect(shuffled).toEqual(joint);
		})
	);
});

it('moves with a scale of the capacitances, and nothing else changes', () => {
	const scaled = computeJointDistribution({
		...input,
		columns: input.columns.map((of) => ({ ...of, values: of.values.map((value) => 3 * value) }))
	})!;
	const shift = Math.log(3);
	expectClose(
		scaled.lotMeans,
		[...joint.lotMeans].map((mean) => mean + shift),
		12
	);
	expectClose(scaled.withinLots, [...joint.withinLots], 15);
});

it('has none for a single device', () => {
	const columns = input.columns.map((of) => ({
		...of,
		values: of.values.map((value, device) => (device === 0 ? value : Number.NaN))
	}));
	expect(computeJointDistribution({ ...input, columns })).toBeUndefined();
});

it('has no covariance of a curve from one lot, nor from lots of single devices', () => {
	const oneLot = computeJointDistribution({ ...input, groupOf: new Int32Array(11) })!;
	expect(() => curveCovariance(oneLot)).toThrow(new TooFewLotsError('curveCovariance', 2, 1));
	expect(momentsOfPair(oneLot, 20, 0)?.correlation).toBeCloseTo(0.976292309797071, 12);

	const singles = computeJointDistribution({
		...input,
		groupOf: Int32Array.from(LOT.keys()),
		groups: LOT.map((_, i) => ({ lot: `L${i}`, waferLot: `L${i}`, wafer: '1' }))
	})!;
	expect(() => curveCovariance(singles)).toThrow(
		new SampleTooSmallError('curveCovariance', 12, 11)
	);
	expect(momentsOfPair(singles, 20, 0)?.correlation).toBeCloseTo(0.976292309797071, 12);
});

describe('its bytes', () => {
	const bytes = packJoint(joint);

	it('give every bit back, also from an odd place of a larger buffer', () => {
		const larger = new Uint8Array(bytes.length + 3);
		larger.set(bytes, 3);
		expect(unpackJoint(larger.subarray(3))).toEqual(joint);
	});

	it('are refused when they were cut short or are of another kind', () => {
		expect(() => unpackJoint(bytes.subarray(0, bytes.length - 8))).toThrow(
			new PackedJointError(`${bytes.length} bytes, got ${bytes.length - 8}`)
		);
		expect(() => unpackJoint(bytes.subarray(0, 20))).toThrow(PackedJointError);
		expect(() => unpackJoint(new TextEncoder().encode('lot,wafer,site'))).toThrow(
			new PackedJointError('the mark PJD1 at their start')
		);
	});
});
