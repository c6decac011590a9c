import { expect, it } from 'vitest';
import { randomSource } from '../../src/lib/core/stats/randomSource';
import { drawsFrom } from '../../src/tasks/confidence/draws';
import { judge, unseenLimitations } from '../../src/tasks/confidence/judge';
import { LOTS_STUDIES } from '../../src/tasks/confidence/lotsStudies';
import { NORMAL_STUDIES } from '../../src/tasks/confidence/normalStudies';
import { ORDER_STUDIES } from '../../src/tasks/confidence/orderStudies';
import { SCREENED_STUDIES } from '../../src/tasks/confidence/screenedStudies';
import { PROMISE, runStudy, type Cell, type Study } from '../../src/tasks/confidence/study';

/*
 * A part of `npm run confidence`, small enough for every run of the tests. The bound is four
 * standard errors of so few simulations below what is stated.
 */

const SIMULATIONS = 2000;
const STANDARD_ERROR = Math.sqrt((PROMISE.confidence * (1 - PROMISE.confidence)) / SIMULATIONS);
const BOUND = PROMISE.confidence - 4 * STANDARD_ERROR;

function find(studies: readonly Study[], shape: string, lots: number, lotShare: number): Study {
	const found = studies.find(
		(study) =>
			study.shape === shape && study.lotSizes.length === lots && study.lotShare === lotShare
	);
	if (found === undefined) throw new Error(`no study of ${lots} ${shape}`);
	return found;
}

const run = (study: Study, simulations = SIMULATIONS) =>
	runStudy(study, simulations, randomSource(11));

it.each([
	['3 lots', find(LOTS_STUDIES, 'lots of 25', 3, 0.6)],
	['12 lots', find(LOTS_STUDIES, 'lots of 25', 12, 0.3)],
	['unequal lots', find(LOTS_STUDIES, 'lots of 50, 20, 5 …', 5, 0.9)],
	['one population', find(NORMAL_STUDIES, 'lots of 25', 8, 0)],
	['order statistics', find(ORDER_STUDIES, 'lots, 480 devices in all', 8, 0)],
	['screened devices', find(SCREENED_STUDIES, 'lots of 25', 5, 0)]
])('keeps the confidence stated: %s', (_, study) => {
	for (const cell of run(study)) expect(cell.confidence).toBeGreaterThan(BOUND);
});

it('keeps it with wafers in lots', () => {
	const cells = run(find(LOTS_STUDIES, 'lots of 1 to 4 wafers of 2 to 15', 5, 0.6), 400);
	const bound = PROMISE.confidence - 4 * Math.sqrt(0.95 * 0.05 * (1 / 400));
	for (const cell of cells) expect(cell.confidence).toBeGreaterThan(bound);
});

// limits.md: pooling 3 lots that carry half the variance turns 95 % into about 48 %
// 400 runs are within 0.025 of that, four standard errors from the bounds
it('notices the pooling of lots, and lots beside a line', () => {
	const pooled = run(find(NORMAL_STUDIES, 'lots of 25', 3, 0.6), 400);
	for (const cell of pooled) expect(cell.confidence).toBeLessThan(0.6);
	const beside = run(find(SCREENED_STUDIES, 'lots of 25', 3, 0.6), 400);
	for (const cell of beside) expect(cell.confidence).toBeLessThan(0.7);
});

const cell = (change: Partial<Cell>): Cell => ({
	method: 'lots',
	promise: 'each',
	shape: 'lots of 25',
	lotSizes: [25, 25, 25],
	lotShare: 0.6,
	confidence: 0.94,
	standardError: 0.002,
	simulations: 10_000,
	...change
});

it('judges a cell by what is stated and by the limitations users are told of', () => {
	expect(judge(cell({}))).toEqual({ status: 'holds' });
	expect(judge(cell({ confidence: 0.9399 }))).toEqual({ status: 'falls short' });
	expect(judge(cell({ method: 'normal', confidence: 0.5 }))).toEqual({
		status: 'limited',
		limitation: 'pooled lots'
	});
	expect(judge(cell({ method: 'normal', confidence: 0.5, lotShare: 0 }))).toEqual({
		status: 'falls short'
	});
	const unequal = { lotSizes: [150, 5, 2], confidence: 0.92 };
	expect(judge(cell({ ...unequal, lotShare: 0 }))).toEqual({
		status: 'limited',
		limitation: 'very unequal lots'
	});
	expect(judge(cell(unequal))).toEqual({ status: 'falls short' });
});

it('names limitations that nothing shows any more', () => {
	expect(unseenLimitations([cell({ method: 'order', confidence: 0.5 })])).toEqual([
		'lots beside the line',
		'very unequal lots'
	]);
});

// Moments of chi-square: mean ν, variance 2ν
it.each([1, 2, 24, 300])('draws chi-squares of %i degrees', (degrees) => {
	const { chiSquare } = drawsFrom(randomSource(3));
	const count = 40_000;
	const drawn = Float64Array.from({ length: count }, () => chiSquare(degrees));
	const moment = (power: number, about: number) =>
		drawn.reduce((sum, x) => sum + (x - about) ** power, 0) / count;
	expect(moment(1, 0) / degrees).toBeCloseTo(1, 1);
	expect(moment(2, degrees) / (2 * degrees)).toBeCloseTo(1, 1);
	expect(chiSquare(0)).toBe(0);
});
