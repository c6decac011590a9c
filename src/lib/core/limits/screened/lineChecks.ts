import { groupBy } from '../../groupBy';
import { chiSquareUpperTail } from '../../stats/chiSquare';
import { fUpperTail } from '../../stats/fDistribution';
import { mean } from '../../stats/mean';
import { regressionLine, type RegressionLine } from '../../stats/regressionLine';

export interface LineCheck {
	readonly statistic: number;
	readonly p: number;
}

/** What the pairs depart from their line. */
export function residualsOf(
	{ intercept, slope }: RegressionLine,
	x: readonly number[],
	y: readonly number[]
): number[] {
	return x.map((value, i) => y[i]! - intercept - slope * value);
}

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);
const squares = (values: readonly number[]) => sum(values.map((value) => value * value));

/**
 * F of a square of x added to the line: whether it is bent.
 *
 * R: anova(lm(y ~ x), lm(y ~ x + I(x^2)))
 *
 * @returns `undefined` when x takes fewer than three values, or for fewer than four pairs
 */
export function bendCheck(
	x: readonly number[],
	residuals: readonly number[]
): LineCheck | undefined {
	const count = x.length;
	if (count < 4 || new Set(x).size < 3) return undefined;
	const centre = mean(x);
	const offsets = x.map((value) => value - centre);
	const square = offsets.map((value) => value * value);
	const level = mean(square);
	const tilt = sum(offsets.map((value, i) => value * square[i]!)) / sum(square);
	const bend = offsets.map((value, i) => square[i]! - level - tilt * value);
	const gain = sum(bend.map((value, i) => value * residuals[i]!)) ** 2 / squares(bend);
	const left = (squares(residuals) - gain) / (count - 3);
	const statistic = gain / left;
	return { statistic, p: fUpperTail(statistic, { numerator: 1, denominator: count - 3 }) };
}

/**
 * Whether the squared residuals change along x: n·R² of a line through them, against chi-square
 * with one degree of freedom.
 *
 * Source: Breusch and Pagan 1979, in the form of Koenker 1981, which needs no normal residuals.
 */
export function spreadCheck(x: readonly number[], residuals: readonly number[]): LineCheck {
	const { correlation } = regressionLine(
		x,
		residuals.map((residual) => residual * residual)
	);
	const statistic = x.length * correlation ** 2;
	return { statistic, p: chiSquareUpperTail(statistic, 1) };
}

export interface LotEffect extends LineCheck {
	readonly degrees: readonly [number, number];
}

/**
 * F of a height of its own for each lot, one slope common to all: whether the lots differ in what
 * the tested value leaves open. Without x it is the one-way analysis of variance.
 *
 * R: anova(lm(y ~ x), lm(y ~ x + lot))
 *
 * @returns `undefined` for fewer than two lots or no degree of freedom inside them
 */
export function lotEffect(
	x: readonly number[] | undefined,
	y: readonly number[],
	groups: readonly (string | number)[]
): LotEffect | undefined {
	const lots = groupBy([...y.keys()], (i) => groups[i]!);
	const slopes = x === undefined ? 0 : 1;
	const within = y.length - lots.size - slopes;
	if (lots.size < 2 || within < 1) return undefined;
	const total = residualSquares(x, y, [[...y.keys()]]);
	const inside = residualSquares(x, y, [...lots.values()]);
	if (!(inside > 0)) return undefined;
	const between = lots.size - 1;
	const statistic = (total - inside) / between / (inside / within);
	const p = fUpperTail(statistic, { numerator: between, denominator: within });
	return { statistic, p, degrees: [between, within] };
}

/** Residual sum of squares with a height for each group and one slope, if there is an x. */
function residualSquares(
	x: readonly number[] | undefined,
	y: readonly number[],
	groups: readonly (readonly number[])[]
): number {
	let [xx, xy, yy] = [0, 0, 0];
	for (const members of groups) {
		const meanX = x === undefined ? 0 : mean(members.map((i) => x[i]!));
		const meanY = mean(members.map((i) => y[i]!));
		for (const i of members) {
			const dx = x === undefined ? 0 : x[i]! - meanX;
			const dy = y[i]! - meanY;
			xx += dx * dx;
			xy += dx * dy;
			yy += dy * dy;
		}
	}
	return xx > 0 ? yy - (xy * xy) / xx : yy;
}
