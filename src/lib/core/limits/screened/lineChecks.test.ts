import { readFileSync } from 'node:fs';
import { expect, it } from 'vitest';
import { regressionLine } from '../../stats/regressionLine';
import { bendCheck, lotEffect, residualsOf, spreadCheck } from './lineChecks';

const COLUMNS = readFileSync('tests/oracle/data/screen_pairs_synthetic.csv', 'utf8')
	.trim()
	.split('\n')
	.slice(1)
	.map((line) => line.split(',').map(Number));
const X = COLUMNS.map(([, tested = NaN]) => Math.log(tested));
const Y = COLUMNS.map(([, , limited = NaN]) => Math.log(limited));
const LOTS = X.map((_, i) => Math.floor(i / 15));
const SHIFTED = Y.map((y, i) => y + [0, 0.01, -0.01, 0.02][LOTS[i]!]!);
const RESIDUALS = residualsOf(regressionLine(X, Y), X, Y);

// R 4.2.2: anova(lm(y ~ x), lm(y ~ x + I(x^2))), F from its sums of squares
it('finds the F of a bend that R finds', () => {
	const found = bendCheck(X, RESIDUALS)!;
	expect(found.statistic).toBeCloseTo(4.646312644e-5 / (0.005984053655 / 57), 6);
	expect(found.p).toBeCloseTo(0.50856, 5);
	expect(bendCheck([1, 2, 3], [0, 1, 0])).toBeUndefined();
	expect(bendCheck([1, 1, 2, 2], [0, 1, 0, 1])).toBeUndefined();
});

// R 4.2.2: r2 <- resid(m)^2; 60 * summary(lm(r2 ~ x))$r.squared and its pchisq
it('finds the Breusch–Pagan statistic that R finds', () => {
	const found = spreadCheck(X, RESIDUALS);
	expect(found.statistic).toBeCloseTo(0.638603207673, 9);
	expect(found.p).toBeCloseTo(0.42421704891, 9);
});

// R 4.2.2: anova(lm(y2 ~ x), lm(y2 ~ x + lot)): F 26.43476, p 1.0145e-10
it('compares lots at the same tested value as R does', () => {
	const found = lotEffect(X, SHIFTED, LOTS)!;
	expect(found.degrees).toEqual([3, 55]);
	expect(found.statistic).toBeCloseTo(0.008545835029 / 3 / (0.005926804503 / 55), 5);
	expect(found.p / 1.0145e-10).toBeCloseTo(1, 4);
});

// R 4.2.2: anova(lm(y2 ~ lot)): F 4.7767, p 0.0049254
it('is the one-way analysis of variance without a tested value', () => {
	const found = lotEffect(undefined, SHIFTED, LOTS)!;
	expect(found.degrees).toEqual([3, 56]);
	expect(found.statistic).toBeCloseTo(0.008191532822 / 0.001714892695, 6);
	expect(found.p).toBeCloseTo(0.0049254, 7);
});

it('compares nothing of one lot, or of lots of one device', () => {
	expect(
		lotEffect(
			X,
			Y,
			LOTS.map(() => 'one')
		)
	).toBeUndefined();
	expect(lotEffect(X, Y, [...X.keys()])).toBeUndefined();
});
