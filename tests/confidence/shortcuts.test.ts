import { expect, it } from 'vitest';
import { nestedStrata, oneWayStrata, type LotStrata } from '../../src/lib/core/stats/lotStrata';
import {
	lotsToleranceHalfWidth,
	lotsToleranceMargin
} from '../../src/lib/core/stats/lotsToleranceMargin';
import { normalBetween } from '../../src/lib/core/stats/normalDistribution';
import { normalQuantile } from '../../src/lib/core/stats/normalQuantile';
import { normalSource, randomSource } from '../../src/lib/core/stats/randomSource';
import { regressionLine } from '../../src/lib/core/stats/regressionLine';
import { edgeRule } from '../../src/lib/core/stats/regressionTolerance';
import {
	drawSums,
	NESTED,
	nestedPopulation,
	ONE_WAY,
	oneWayPopulation
} from '../../src/tasks/confidence/design';
import { drawsFrom } from '../../src/tasks/confidence/draws';
import { lotsLimitsHold } from '../../src/tasks/confidence/lotsStudies';
import { edgeLimitHolds } from '../../src/tasks/confidence/screenedStudies';
import { PROMISE, SHARED_CONFIDENCE } from '../../src/tasks/confidence/study';

/*
 * The simulations ask whether a limit reaches far enough without solving for it. Here the limits are
 * solved for, as a table prints them, and must say the same of every sample.
 */

const { content, confidence } = PROMISE;
const Z = normalQuantile(content);

function solvedLimitsHold(strata: LotStrata): readonly boolean[] {
	const { mean } = strata;
	const single = lotsToleranceMargin(strata, PROMISE);
	const shared = lotsToleranceMargin(strata, { content, confidence: SHARED_CONFIDENCE });
	const half = lotsToleranceHalfWidth(strata, { content, confidence });
	return [
		mean - single <= -Z,
		mean - shared <= -Z && mean + shared >= Z,
		normalBetween(mean - half, mean + half) >= content
	];
}

it.each(ONE_WAY.map((design, i) => [design, [0, 0.3, 0.6, 0.9][i % 4] ?? 0] as const))(
	'says of lots and devices what the limits themselves say: $shape',
	(design, share) => {
		const draws = drawsFrom(randomSource(21));
		let kept = 0;
		for (let i = 0; i < 40; i++) {
			const strata = oneWayStrata(drawSums(design, oneWayPopulation(share), draws).flat());
			const solved = solvedLimitsHold(strata);
			expect(lotsLimitsHold(strata)).toEqual(solved);
			if (solved[0] === true) kept++;
		}
		expect(kept).toBeGreaterThan(0);
	}
);

it('says the same of lots, wafers and devices', () => {
	const draws = drawsFrom(randomSource(22));
	for (const design of NESTED)
		for (let i = 0; i < 10; i++) {
			const strata = nestedStrata(drawSums(design, nestedPopulation(0.6), draws));
			expect(lotsLimitsHold(strata)).toEqual(solvedLimitsHold(strata));
		}
});

it('says of a screened maximum what the edge rule says', () => {
	const normal = normalSource(randomSource(23));
	const residual = Math.sqrt(1 - 0.9 ** 2);
	const truth = 0.9 * 2 + Z * residual;
	const outcomes = Array.from({ length: 200 }, () => {
		const x = Array.from({ length: 12 }, () => normal());
		const y = x.map((value) => 0.9 * value + residual * normal());
		const line = regressionLine(x, y);
		const { maximum } = edgeRule(line, { highest: 2 }, PROMISE);
		return { quick: edgeLimitHolds(line), solved: maximum !== undefined && maximum >= truth };
	});
	expect(outcomes.map(({ quick }) => quick)).toEqual(outcomes.map(({ solved }) => solved));
	expect(outcomes.some(({ solved }) => !solved)).toBe(true);
});
