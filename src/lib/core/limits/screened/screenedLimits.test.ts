import fc from 'fast-check';
import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { screenedMessages as say } from '../../messages/screened';
import { normalQuantile } from '../../stats/normalQuantile';
import { screenedLimits } from './screenedLimits';
import { screenedRequest } from './screenedRequest';

/** 60 synthetic devices, pF at 1 V and at 8 V: the reference data of the oracle. */
const ROWS = readFileSync('tests/oracle/data/screen_pairs_synthetic.csv', 'utf8')
	.trim()
	.split('\n')
	.slice(1)
	.map((line) => line.split(',').map(Number));
const TESTED = ROWS.map(([, tested = NaN]) => tested);
const LIMITED = ROWS.map(([, , limited = NaN]) => limited);
const PAIRS = { tested: TESTED, limited: LIMITED };
const WINDOW = { low: 16.8, high: 19.2 };
const PROMISE = { content: 0.99, confidence: 0.95 };
const LOTS = ROWS.map((_, i) => `lot ${Math.floor(i / 15) + 1}`);

function answered(request: Readonly<Record<string, unknown>>) {
	const outcome = screenedLimits(screenedRequest.parse({ ...PROMISE, ...request }));
	if (outcome.status === 'refused') throw new Error(JSON.stringify(outcome.problems));
	return outcome.answer;
}

function problemsOf(request: Readonly<Record<string, unknown>>) {
	const outcome = screenedLimits(screenedRequest.parse({ ...PROMISE, ...request }));
	return outcome.status === 'refused' ? outcome.problems : [];
}

const MOMENTS = { means: [1, 1], deviations: [0.1, 0.1], correlation: 0.5, n: 30 };

type Answer = ReturnType<typeof answered>;
const verdictOf = ({ conditions }: Answer, name: string) =>
	conditions.find((condition) => condition.name === name)?.verdict;
const statementOf = ({ conditions }: Answer, name: string) =>
	conditions.find((condition) => condition.name === name)?.statement;

// References M-syn-max-p0.99-c0.95, M-syn-max-p0.99-c0.975, M-syn-min-p0.99-c0.975, M-syn-unscreened-max
it('limits 8 V behind a test at 1 V as the references do', () => {
	const maximum = answered({ ...PAIRS, window: WINDOW, sides: 'maximum' });
	expect(maximum.maximum).toBeCloseTo(7.9982872, 6);
	expect(maximum.minimum).toBeNull();
	expect(maximum.unscreened.maximum).toBeCloseTo(8.0320695, 6);

	const both = answered({ ...PAIRS, window: WINDOW });
	expect(both.maximum).toBeCloseTo(8.01003355, 6);
	expect(both.minimum).toBeCloseTo(6.43146048, 6);
	expect(both.method).toBe('edge-rule');
	expect(both.warnings).toContain(say.confidenceShared(0.95, 0.975));
});

it('says the same from the moments of the logarithms', () => {
	// R 4.2.2: mean, sd, cor of the logarithms of the 60 pairs
	const moments = {
		means: [2.88199826496924, 1.9634495746621],
		deviations: [0.0355689585007389, 0.0427468122848753],
		correlation: 0.971629317523267,
		n: 60
	};
	const fromMoments = answered({ ...moments, window: WINDOW });
	const fromPairs = answered({ ...PAIRS, window: WINDOW });
	expect(fromMoments.minimum).toBeCloseTo(fromPairs.minimum!, 9);
	expect(fromMoments.maximum).toBeCloseTo(fromPairs.maximum!, 9);
	expect(fromMoments.verdict).toBe('not-checked');
	expect(verdictOf(fromMoments, 'inside-range')).toBe('not-checked');
	const ranged = answered({ ...moments, window: WINDOW, testedRange: [16.9, 19.5] });
	expect(verdictOf(ranged, 'inside-range')).toBe('fails');
});

// R 4.2.2: anova(lm(y ~ x), lm(y ~ x + I(x^2))): F 0.44258, p 0.50856; n·R² of lm(resid² ~ x):
// 0.638603, p 0.42421704891; anova(lm(y ~ x), lm(y ~ x + lot)), lots of 15: F 0.32081, p 0.81027
it('checks its conditions and shows each', () => {
	const answer = answered({ ...PAIRS, groups: LOTS, window: WINDOW, uncertainty: 0.01 });
	expect(answer.verdict).toBe('holds');
	expect(statementOf(answer, 'linear')).toBe(say.linear('0.4426', 'p\u00a0=\u00a00.51'));
	expect(statementOf(answer, 'even-spread')).toBe(say.even('0.6386', 'p\u00a0=\u00a00.42'));
	expect(statementOf(answer, 'lots')).toBe(
		say.lotsAlike('F(3, 55) = 0.3208', 'p\u00a0=\u00a00.81')
	);
	expect(answer.conditions.find(({ name }) => name === 'lots')?.p).toBeCloseTo(0.81027, 5);
	expect(answer.conditions.find(({ name }) => name === 'even-spread')?.p).toBeCloseTo(
		0.42421704891,
		9
	);
	expect(statementOf(answer, 'edges')).toBe(say.rises());
	expect(statementOf(answer, 'tester-uncertainty')).toBe(say.widenedBy('16.7900', '19.2100'));
	expect(answer.warnings).toEqual([say.confidenceShared(0.95, 0.975)]);
});

// R 4.2.2: anova(lm(y ~ x), lm(y ~ x + lot)) with lots moved by 0, 0.01, −0.01, 0.02: F 26.43476
it('calls nothing a guarantee whose lots differ beyond what the test sees', () => {
	const moved = LIMITED.map(
		(value, i) => value * Math.exp([0, 0.01, -0.01, 0.02][Math.floor(i / 15)]!)
	);
	const answer = answered({ tested: TESTED, limited: moved, groups: LOTS, window: WINDOW });
	expect(answer.verdict).toBe('fails');
	expect(statementOf(answer, 'lots')).toBe(
		say.lotsDiffer('F(3, 55) = 26.43', 'p\u00a0<\u00a00.0001')
	);
	expect(answer.warnings[0]).toBe(say.failed(['lots alike on the residuals']));
});

it('finds a bent line, a spread that grows, and an edge that was not characterized', () => {
	const x = Array.from({ length: 40 }, (_, i) => 10 + i * 0.1);
	const noise = x.map((_, i) => normalQuantile((((i * 17) % 40) + 0.5) / 40) * 0.01);
	const bent = answered({
		tested: x,
		limited: x.map((value, i) => 5 + value + 0.05 * (value - 12) ** 2 + noise[i]!),
		transform: 'identity',
		window: { low: 11, high: 13 }
	});
	expect(verdictOf(bent, 'linear')).toBe('fails');
	const fanned = answered({
		tested: x,
		limited: x.map((value, i) => 5 + value + noise[i]! * i),
		transform: 'identity',
		window: { low: 11, high: 13 }
	});
	expect(verdictOf(fanned, 'even-spread')).toBe('fails');
	const far = answered({ ...PAIRS, window: { low: 15, high: 19.2 } });
	expect(verdictOf(far, 'inside-range')).toBe('fails');
	expect(verdictOf(answered({ ...PAIRS, window: { ...WINDOW, low: 16.28 } }), 'inside-range')).toBe(
		'holds'
	);
	// 16.2762 is the smallest device: U of the tester leads out of what was characterized
	const widened = answered({ ...PAIRS, window: { ...WINDOW, low: 16.28 }, uncertainty: 0.01 });
	expect(verdictOf(widened, 'inside-range')).toBe('fails');
});

it('finds residuals that are not normal, with a screen and without', () => {
	const skewed = LIMITED.map((value, i) => value * Math.exp(i % 12 === 0 ? 0.06 : 0));
	const answer = answered({ tested: TESTED, limited: skewed, window: WINDOW });
	expect(verdictOf(answer, 'normal')).toBe('fails');
	expect(answer.warnings[0]).toBe(say.failed(['normal residuals']));
	const ratio = answered({
		tested: TESTED,
		limited: TESTED.map((value, i) => value * Math.exp(i % 12 === 0 ? 0.06 : i / 10_000)),
		quantity: 'ratio'
	});
	expect(verdictOf(ratio, 'normal')).toBe('fails');
});

it('says what it could not check', () => {
	const few = answered({
		tested: [17, 18, 19, 18.5],
		limited: [6.8, 7.1, 7.5, 7.4],
		groups: ['A', 'A', 'A', 'A'],
		window: { low: 17.5, high: 18.5 }
	});
	expect(statementOf(few, 'linear')).toBe(say.tooFewToTell(8));
	expect(statementOf(few, 'lots')).toBe(say.oneLot());
	const exact = answered({
		tested: TESTED,
		limited: TESTED.map((value) => value * 2),
		window: WINDOW
	});
	expect(statementOf(exact, 'normal')).toBe(say.noResiduals());
	expect(exact.minimum).toBeCloseTo(33.6, 9);
	expect(exact.warnings).toContain(
		say.notChecked([
			'straight line',
			'even spread',
			'normal residuals',
			'lots alike on the residuals',
			'window widened by the uncertainty of the tester'
		])
	);
});

// With ever more devices the factor comes down to z of the content
it('answers for very many devices', () => {
	const { factors } = answered({ ...MOMENTS, n: 1e8, window: { low: 2.6, high: 2.9 } });
	expect(factors.maximum).toBeGreaterThan(2.3263478740408408);
	expect(factors.maximum).toBeLessThan(2.3275);
});

it('moves limits outwards by the uncertainty of the tester', () => {
	const plain = answered({ ...PAIRS, window: WINDOW });
	const absolute = answered({ ...PAIRS, window: WINDOW, uncertainty: { absolute: 0.05 } });
	const same = answered({ ...PAIRS, window: { low: 16.75, high: 19.25 } });
	expect(absolute.maximum).toBe(same.maximum);
	expect(absolute.minimum).toBe(same.minimum);
	expect(absolute.maximum!).toBeGreaterThan(plain.maximum!);
	const relative = answered({ ...PAIRS, window: WINDOW, uncertainty: { relative: 0.01 } });
	expect(relative.maximum).toBe(
		answered({ ...PAIRS, window: { low: 16.8 * 0.99, high: 19.2 * 1.01 } }).maximum
	);
});

// Issue: medians 15 and 2 pF, σ_ln 2 % and 2.5 %, correlation 0.8, content 0.99 each: 7.24 to 7.77,
// not 6.75 to 8.33. By hand: σ² = 0.0004 + 0.000625 − 0.0008, 7.5·exp(±2.326348·0.015)
const RATIO = {
	means: [Math.log(15), Math.log(2)],
	deviations: [0.02, 0.025],
	correlation: 0.8,
	content: 0.99,
	quantity: 'ratio'
};
it('limits a ratio by its own spread: 7.24 to 7.77', () => {
	const answer = answered({ ...RATIO, confidence: undefined });
	expect(answer.method).toBe('unscreened');
	expect(answer.minimum).toBeCloseTo(7.5 * Math.exp(-2.3263478740408408 * 0.015), 10);
	expect(answer.maximum).toBeCloseTo(7.5 * Math.exp(2.3263478740408408 * 0.015), 10);
	expect(answer.minimum!.toFixed(2)).toBe('7.24');
	expect(answer.maximum!.toFixed(2)).toBe('7.77');
});

// R 4.2.2: r <- x − y; exp(mean(r) ∓ k·sd(r)), k = qt(.975, 59, qnorm(.99)√60)/√60 = 2.91085071848;
// lm(r ~ x) falls: minimum at 19.2, k 3.14860424264, maximum at 16.8, k 3.08551815185
it('limits a ratio of measured devices, screened or not, and turns the edges of a falling line', () => {
	const plain = answered({ ...PAIRS, quantity: 'ratio' });
	expect(plain.minimum).toBeCloseTo(2.42148115852, 9);
	expect(plain.maximum).toBeCloseTo(2.59274712259, 9);
	expect(plain.factors.maximum).toBeCloseTo(2.91085071848, 9);
	const screened = answered({ ...PAIRS, quantity: 'ratio', window: WINDOW });
	expect(screened.minimum).toBeCloseTo(2.39699370449, 9);
	expect(screened.maximum).toBeCloseTo(2.61215940624, 9);
	expect(screened.factors.minimum).toBeCloseTo(3.14860424264, 9);
	expect(statementOf(screened, 'edges')).toBe(say.falls());
	expect(screened.warnings).toEqual(
		expect.arrayContaining([say.noGain('minimum'), say.noGain('maximum')])
	);
});

// References M-condq-rho0.9-a-1-b1-p0.99 and M-yield-1; the window lies evenly, so the minimum mirrors
it('cuts the normal pair off at the window when its parameters are known', () => {
	const known = {
		means: [10, 5],
		deviations: [2, 0.5],
		correlation: 0.9,
		transform: 'identity',
		window: { low: 8, high: 12 }
	};
	const answer = answered({ ...known, confidence: undefined });
	expect(answer.method).toBe('truncated-normal');
	expect(answer.factors.maximum).toBeCloseTo(1.45149964, 6);
	expect(answer.maximum).toBeCloseTo(5 + 0.5 * 1.45149964, 6);
	expect(answer.minimum).toBeCloseTo(5 - 0.5 * 1.45149964, 6);
	expect(answer.yield).toBeCloseTo(0.6826894921, 9);
	// By hand: 0.9 + 2.326348·√0.19
	expect(answer.edgeRule?.maximum).toBeCloseTo(
		5 + 0.5 * (0.9 + 2.3263478740408408 * Math.sqrt(0.19)),
		9
	);
	expect(answer.warnings).toContain(say.distributionMustStay());
	const falling = answered({ ...known, correlation: -0.9 });
	expect(falling.maximum).toBeCloseTo(answer.maximum!, 9);
	expect(falling.edgeRule?.minimum).toBeCloseTo(answer.edgeRule!.minimum!, 9);
	const oneSided = answered({ ...known, window: { high: 12 } });
	expect(oneSided.edgeRule?.minimum).toBeNull();
	expect(oneSided.minimum!).toBeLessThan(answer.minimum!);
});

it('derives a limit so that it can be redone from the printed digits', () => {
	const { derivation, maximum } = answered({ ...PAIRS, window: WINDOW, sides: 'maximum' });
	const printed = (name: string) =>
		Number(derivation.find((step) => step.name === name)?.text.replace('\u2212', '-'));
	const height = printed('Intercept') + printed('Slope') * printed('Upper edge');
	const redone = height + printed('Factor, maximum') * printed('Residual deviation');
	expect(redone).toBeCloseTo(printed('Transformed maximum'), 6);
	expect(Math.exp(redone)).toBeCloseTo(maximum!, 5);
	expect(printed('d², maximum')).toBeCloseTo(
		1 / 60 + (Math.log(19.2) - 2.881998265) ** 2 / 0.07464389772,
		7
	);
});

it.each([
	[{ tested: [1, 2, 3] }, 'limited', say.limitedMissing()],
	[{ tested: [1, 2, 3], limited: [1, 2] }, 'limited', say.lengthsDiffer(3, 2)],
	[{ ...PAIRS, groups: ['A'] }, 'groups', say.lengthsDiffer(60, 1)],
	[{ tested: [1, 2, 3], limited: [1, 0, 2] }, 'limited[1]', say.noLogarithm(0)],
	[{ tested: [1, 2], limited: [1, 2] }, 'tested', say.fewPairs(2)],
	[{ tested: [2, 2, 2], limited: [1, 2, 3] }, 'tested', say.noSpread()],
	[{ means: [1, 1], correlation: 0.5 }, 'deviations', say.momentMissing()],
	[{ means: [1, 1], deviations: [1, 1] }, 'correlation', say.momentMissing()],
	[{ ...MOMENTS, n: null, correlation: 1 }, 'correlation', say.fullCorrelation()],
	[{ ...MOMENTS, correlation: 1, quantity: 'ratio' }, 'deviations', say.noSpreadOfRatio()],
	[{ ...MOMENTS, testedRange: [-1, 2] }, 'testedRange[0]', say.noLogarithm(-1)],
	[{ ...MOMENTS, window: WINDOW, confidence: undefined }, 'confidence', say.confidenceMissing()],
	[{ ...PAIRS, quantity: 'ratio', transform: 'identity' }, 'transform', say.ratioNeedsLogarithms()],
	[PAIRS, 'window', say.windowMissing()],
	[{ ...PAIRS, window: {} }, 'window', say.windowMissing()],
	[{ ...PAIRS, window: { low: 2, high: 1 } }, 'window', say.windowCrossed()],
	[
		{ ...PAIRS, window: { low: 1, high: 20 }, uncertainty: 2 },
		'window.low',
		say.windowNotPositive('low', -1)
	],
	[
		{ ...PAIRS, window: { low: 17 }, sides: 'maximum' },
		'window.high',
		say.edgeMissing('maximum', 'high', true)
	],
	[
		{ ...PAIRS, window: { low: 17 }, sides: 'minimum', quantity: 'ratio' },
		'window.high',
		say.edgeMissing('minimum', 'high', false)
	],
	[{ ...MOMENTS, n: null, window: { low: 100, high: 101 } }, 'window', say.nothingPasses()]
])('refuses with the place: %#', (request, path, message) => {
	expect(problemsOf(request)[0]).toEqual({ path, message });
});

it('refuses at the door what is neither pairs nor moments, or both, and a misspelt key', () => {
	for (const request of [
		PROMISE,
		{ ...PROMISE, ...PAIRS, ...MOMENTS },
		{ ...PROMISE, ...PAIRS, lot: [] }
	])
		expect(screenedRequest.safeParse(request).success).toBe(false);
});

const scale = fc.double({ min: 0.01, max: 100, noNaN: true });
it('scales limits with the values of either condition', () => {
	const one = answered({ ...PAIRS, window: WINDOW });
	fc.assert(
		fc.property(scale, scale, (byTested, byLimited) => {
			const scaled = answered({
				tested: TESTED.map((value) => value * byTested),
				limited: LIMITED.map((value) => value * byLimited),
				window: { low: WINDOW.low * byTested, high: WINDOW.high * byTested }
			});
			expect(scaled.minimum! / byLimited / one.minimum!).toBeCloseTo(1, 9);
			expect(scaled.maximum! / byLimited / one.maximum!).toBeCloseTo(1, 9);
		}),
		{ numRuns: 30 }
	);
});

it('never tightens a limit for more content or confidence', () => {
	const share = fc.double({ min: 0.5, max: 0.9999, noNaN: true });
	fc.assert(
		fc.property(share, share, share, fc.boolean(), (content, confidence, more, isKnown) => {
			const of = { ...PAIRS, window: WINDOW };
			const known = { ...MOMENTS, n: null, window: { low: 2.6, high: 2.9 } };
			const base = answered({ ...(isKnown ? known : of), content, confidence });
			const more1 = content + (1 - content) * more * 0.99;
			const more2 = confidence + (1 - confidence) * more * 0.99;
			const wider = answered({ ...(isKnown ? known : of), content: more1, confidence: more2 });
			expect(wider.minimum!).toBeLessThanOrEqual(base.minimum! * (1 + 1e-9));
			expect(wider.maximum!).toBeGreaterThanOrEqual(base.maximum! * (1 - 1e-9));
		}),
		{ numRuns: 60 }
	);
});

it('does not mind the order of the devices', () => {
	const one = answered({ ...PAIRS, groups: LOTS, window: WINDOW });
	const order = fc.shuffledSubarray([...TESTED.keys()], { minLength: TESTED.length });
	fc.assert(
		fc.property(order, (places) => {
			const shuffled = answered({
				tested: places.map((i) => TESTED[i]!),
				limited: places.map((i) => LIMITED[i]!),
				groups: places.map((i) => LOTS[i]!),
				window: WINDOW
			});
			expect(shuffled.minimum).toBeCloseTo(one.minimum!, 10);
			expect(shuffled.maximum).toBeCloseTo(one.maximum!, 10);
			shuffled.conditions.forEach(({ verdict, p }, i) => {
				expect(verdict).toBe(one.conditions[i]!.verdict);
				if (p !== undefined) expect(p).toBeCloseTo(one.conditions[i]!.p!, 8);
			});
		}),
		{ numRuns: 20 }
	);
});
