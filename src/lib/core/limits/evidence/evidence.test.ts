import { describe, expect, it } from 'vitest';
import { limitMessages } from '../../messages/limits';
import { allowedOutside } from '../allowedOutside';
import { computeLimitRow } from '../computeLimitRow';
import { countBeyond } from '../countBeyond';
import { AT_FOUR_VOLTS, PLAIN_POLICY, threeSmallLots, withValues } from '../limitTestData';
import { selectLots } from '../selectLots';
import { capability } from './capability';
import { assessPublished, type PublishedLimit } from './publishedLimit';
import { withoutEachLot } from './withoutEachLot';

describe('devices outside', () => {
	// R 4.2.2: qbinom(0.95, n, share)
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

	it('are counted from the outermost, the limit itself not being outside', () => {
		const some = withValues([[1, 2, 3, 4, 5]]);
		expect(countBeyond(some, 'minimum', 3e-12)).toBe(2);
		expect(countBeyond(some, 'maximum', 2e-12)).toBe(3);
		expect(countBeyond(some, 'maximum', 0.5e-12)).toBe(5);
		const many = { ...some, sampleSize: 9 };
		expect(countBeyond(many, 'maximum', 0.5e-12)).toBeUndefined();
	});
});

describe('lots in or out', () => {
	it('is the distribution of the lots that are in', () => {
		const lots = [
			[14.71, 14.93, 15.02, 14.88],
			[15.21, 15.4, 15.11]
		];
		const some = selectLots(threeSmallLots(), (lot) => lot !== 'C');
		const alone = withValues(lots);
		expect(some?.sampleSize).toBe(7);
		expect(some?.mean).toBeCloseTo(alone.mean, 12);
		expect(some?.standardDeviation).toBeCloseTo(alone.standardDeviation, 12);
		expect(selectLots(threeSmallLots(), () => false)).toBeUndefined();
	});

	it('gives the limit without each lot', () => {
		const found = withoutEachLot(threeSmallLots(), PLAIN_POLICY, AT_FOUR_VOLTS);
		expect(found.map(({ lot }) => lot)).toEqual(['A', 'B', 'C']);
		const without = computeLimitRow(
			withValues([
				[14.71, 14.93, 15.02, 14.88],
				[14.5, 14.62, 14.99, 14.7, 14.81]
			]),
			PLAIN_POLICY,
			AT_FOUR_VOLTS
		);
		expect(found[1]?.maximum).toBeCloseTo((without.maximum?.raw ?? 0) * 1, 18);
		expect(found[0]?.refusals).toEqual([]);
	});
});

describe('capability', () => {
	const devices = threeSmallLots();
	const of = (limits: { minimum?: number; maximum?: number }) =>
		capability(devices, limits, { confidence: 0.95, isCircular: true });

	// mean and sd of ln C from R 4.2.2: 2.70167089598399, 0.0173180652276907 (C in pF)
	it('is the distance to the nearer limit in three deviations', () => {
		const found = of({ minimum: 14e-12, maximum: 16e-12 });
		expect(found?.index).toBeCloseTo(
			(2.70167089598399 - Math.log(14)) / (3 * 0.0173180652276907),
			8
		);
		expect(found?.isCircular).toBe(true);
	});

	// Bissell 1990: Ppk·(1 − z·√(1/(9n·Ppk²) + 1/(2(n − 1)))), written out
	it('has a lower bound, and a word for it', () => {
		const found = of({ minimum: 14e-12, maximum: 16e-12 });
		const error = Math.sqrt(1 / (9 * 12 * (found?.index ?? 0) ** 2) + 1 / 22);
		expect(found?.lowerBound).toBeCloseTo(
			(found?.index ?? 0) * (1 - 1.6448536269514722 * error),
			9
		);
		expect(found?.word).toBe('not capable');
		expect(of({ minimum: 13.3e-12 })?.word).toBe('capable');
	});

	it('has nothing to say without a limit or without spread', () => {
		expect(of({})).toBeUndefined();
		const still = withValues([[15, 15, 15]]);
		expect(
			capability(still, { minimum: 14e-12 }, { confidence: 0.95, isCircular: false })
		).toBeUndefined();
	});
});

describe('a published limit against newer data', () => {
	const distribution = threeSmallLots();
	const recomputed = computeLimitRow(distribution, PLAIN_POLICY, AT_FOUR_VOLTS);
	const assess = (published: Partial<PublishedLimit>) =>
		assessPublished(
			{
				minimum: null,
				maximum: null,
				basis: 'characterized',
				unit: 'pF',
				unitScale: 1e-12,
				...published
			},
			{ distribution, recomputed, rules: PLAIN_POLICY }
		);
	const minimum = recomputed.minimum?.printed ?? 0;
	const maximum = recomputed.maximum?.printed ?? 0;

	it('holds when it would be printed the same', () => {
		expect(assess({ minimum, maximum })).toEqual({ state: 'holds', text: '' });
	});

	it('is contradicted when more devices lie outside than the basis allows', () => {
		expect(assess({ minimum, maximum: 15e-12 })).toEqual({
			state: 'contradicted',
			text: limitMessages.contradicted('maximum', '15\u00a0pF', {
				outside: 4,
				allowed: 0,
				sampleSize: 12
			})
		});
	});

	it('is contradicted by a single device behind a test of every device', () => {
		const published = { maximum: 15.3e-12, basis: 'tested' } as const;
		expect(assess(published).state).toBe('contradicted');
	});

	it('is unsupported when today’s would be looser, moved when tighter', () => {
		expect(assess({ maximum: 15.6e-12 })).toEqual({
			state: 'unsupported',
			text: limitMessages.unsupported('maximum', '15.6\u00a0pF', recomputed.maximum?.text ?? '')
		});
		expect(assess({ maximum: 20e-12 }).state).toBe('moved');
		expect(assess({ minimum: 10e-12, maximum: 15.6e-12 }).state).toBe('unsupported');
	});

	it('is unsupported when nothing can be computed any more', () => {
		const refused = computeLimitRow(
			distribution,
			{ ...PLAIN_POLICY, minimumLots: 9 },
			AT_FOUR_VOLTS
		);
		const found = assessPublished(
			{ minimum: null, maximum, basis: 'characterized', unit: 'pF', unitScale: 1e-12 },
			{ distribution, recomputed: refused, rules: PLAIN_POLICY }
		);
		expect(found).toEqual({
			state: 'unsupported',
			text: limitMessages.noLongerComputed('maximum', limitMessages.tooFewLots(9, 3))
		});
	});
});
