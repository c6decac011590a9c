import { describe, expect, it } from 'vitest';
import { limitMessages } from '../../messages/limits';
import { normalQuantile } from '../../stats/normalQuantile';
import { previewLimits, type Preview } from './previewLimits';
import { previewRequest } from './previewRequest';

/** Three lots of 25 devices at exact normal scores, in pF. */
const GROUPS = [14.8, 15.0, 15.2].map((median) =>
	Array.from({ length: 25 }, (_, j) => median * Math.exp(0.015 * normalQuantile((j + 0.5) / 25)))
);
const POLICY = { method: 'normal', content: 0.99, confidence: 0.95, resolution: 0.1 };

const ask = (body: unknown): Preview => previewLimits(previewRequest.parse(body));
function answerOf(body: unknown) {
	const preview = ask(body);
	if (preview.status === 'refused') throw new Error(preview.message);
	return preview.answer;
}
const refusalOf = (body: unknown) => {
	const preview = ask(body);
	return preview.status === 'refused' ? preview : undefined;
};

describe('the worked case', () => {
	it('by `normal`: k₁ = 2.838, 14.238 and 15.801, printed 14.2 and 15.9', () => {
		const answer = answerOf({ groups: GROUPS, transform: 'ln', policy: POLICY });
		expect(answer.factors.minimum).toBeCloseTo(2.838, 3);
		expect(answer.minimum?.raw).toBeCloseTo(14.238, 3);
		expect(answer.maximum?.raw).toBeCloseTo(15.801, 3);
		expect([answer.minimum?.printed, answer.typical?.printed, answer.maximum?.printed]).toEqual([
			14.2, 15, 15.9
		]);
		expect(answer.warnings.join(' ')).toContain('F\u00a0=\u00a019.95');
		expect(answer.components?.lot.variance).toBeGreaterThan(0);
	});

	it('by `lots`: 12.233 and 18.391', () => {
		const answer = answerOf({
			groups: GROUPS,
			transform: 'ln',
			policy: { ...POLICY, method: 'lots' }
		});
		expect(answer.minimum?.raw).toBeCloseTo(12.233, 3);
		expect(answer.maximum?.raw).toBeCloseTo(18.391, 3);
	});

	it('by `order`: refused, 368 devices a side', () => {
		const refusal = refusalOf({
			groups: GROUPS,
			transform: 'ln',
			policy: { ...POLICY, method: 'order' }
		});
		expect(refusal).toMatchObject({
			requiredSampleSize: 368,
			message: limitMessages.orderNeedsMore(368, 75, 2)
		});
	});

	it('is the same from the summary alone, but for `lots`', () => {
		const logs = GROUPS.flat().map(Math.log);
		const mean = logs.reduce((sum, y) => sum + y, 0) / 75;
		const standardDeviation = Math.sqrt(logs.reduce((sum, y) => sum + (y - mean) ** 2, 0) / 74);
		const distribution = { n: 75, mean, standardDeviation };
		const answer = answerOf({ distribution, transform: 'ln', policy: POLICY });
		expect(answer.minimum?.raw).toBeCloseTo(14.238, 3);
		expect(
			refusalOf({ distribution, transform: 'ln', policy: { ...POLICY, method: 'lots' } })?.message
		).toContain(limitMessages.enteredHasNoLots());
	});

	it('with drift, uncertainty and guard band gives test limits inside the printed ones', () => {
		const answer = answerOf({
			groups: GROUPS,
			transform: 'ln',
			policy: { ...POLICY, drift: 0.005, uncertainty: 0.05, guardBand: 1 }
		});
		// 14.238·0.995 − 0.05 = 14.117 → 14.1; 14.1/0.995 + 0.05 = 14.2209 → 14.23
		expect(answer.minimum).toMatchObject({ printed: 14.1, test: 14.23 });
		// 15.801·1.005 + 0.05 = 15.930 → 16.0; 16.0/1.005 − 0.05 = 15.8704 → 15.87
		expect(answer.maximum).toMatchObject({ printed: 16, test: 15.87 });
		expect(answer.testYield?.of).toBe(75);
	});
});

it('takes wafers of lots as a level of their own', () => {
	const nestedGroups = GROUPS.map((lot, index) => [
		lot.slice(0, 12 + index),
		lot.slice(12 + index)
	]);
	const answer = answerOf({
		nestedGroups,
		transform: 'ln',
		policy: { ...POLICY, method: 'lots' }
	});
	expect(answer.components?.wafer).not.toBeNull();
	expect(answer.derivation.map(({ name }) => name)).toContain('Spread of wafer means within lots');
});

it('shows the house rule and says that it promises nothing', () => {
	const answer = answerOf({
		values: [1, 2, 3],
		policy: { ...POLICY, method: 'sigma', k: 2, sides: 'maximum' }
	});
	expect(answer.maximum?.raw).toBeCloseTo(4, 12);
	expect(answer.minimum).toBeNull();
	expect(answer.warnings).toContain(limitMessages.sigmaNeedsTest(2));
});

it('refuses a logarithm of nothing with its place', () => {
	expect(refusalOf({ groups: [[1], [2, 0]], transform: 'ln', policy: POLICY })?.message).toBe(
		limitMessages.noLogarithm('groups[1][1]', 'ln', 0)
	);
});

it.each([
	[{ policy: POLICY }, ''],
	[{ values: [1], groups: [[1]], policy: POLICY }, ''],
	[{ values: [1, 'x'], policy: POLICY }, 'values.1'],
	[{ values: [1, 2], policy: { ...POLICY, content: 1 } }, 'policy.content'],
	[{ values: [1, 2], policy: { ...POLICY, method: 'median' } }, 'policy.method'],
	[{ distribution: { n: 1, mean: 0, standardDeviation: 1 }, policy: POLICY }, 'distribution.n']
])('says where a request is wrong: %j', (body, path) => {
	const read = previewRequest.safeParse(body);
	expect(read.error?.issues[0]?.path.join('.')).toBe(path);
});
