import { robustSpread } from '../../../src/lib/core/measurements/robustSpread';
import {
	andersonDarling,
	andersonDarlingPValue
} from '../../../src/lib/core/stats/andersonDarling';
import { chiSquareQuantile } from '../../../src/lib/core/stats/chiSquare';
import { fQuantile } from '../../../src/lib/core/stats/fDistribution';
import { findRoot } from '../../../src/lib/core/stats/findRoot';
import { groupSums } from '../../../src/lib/core/stats/groupSums';
import { logGamma } from '../../../src/lib/core/stats/logGamma';
import { mean } from '../../../src/lib/core/stats/mean';
import { noncentralTLowerTail, noncentralTQuantile } from '../../../src/lib/core/stats/noncentralT';
import { normalUpperTail } from '../../../src/lib/core/stats/normalDistribution';
import { normalQuantile } from '../../../src/lib/core/stats/normalQuantile';
import { demonstratedContent } from '../../../src/lib/core/stats/orderStatistics';
import {
	oneSidedIndexLowerBound,
	performanceIndex,
	performanceIndexLowerBound
} from '../../../src/lib/core/stats/performanceIndex';
import { quantile } from '../../../src/lib/core/stats/quantile';
import { skewness } from '../../../src/lib/core/stats/skewness';
import { standardDeviation } from '../../../src/lib/core/stats/standardDeviation';
import { studentTQuantile } from '../../../src/lib/core/stats/studentT';
import { oneSidedToleranceFactor } from '../../../src/lib/core/stats/toleranceFactor';
import { lotComponents } from '../../../src/lib/core/stats/varianceComponents';
import { identifier, quantity, type Check } from '../check';
import { groupsAt, numberAt, numbersAt, promiseOf, type Row } from '../rows';

const data = ({ inputs }: Row) => numbersAt(inputs, 'data');
const hasData = (row: Row) => row.inputs['data'] !== undefined;
const within =
	(...beginnings: readonly string[]) =>
	(row: Row) =>
		hasData(row) && quantity('F', ...beginnings)(row);

/** Index of the NIST example of known mean and deviation. */
const nistIndex = ({ inputs }: Row, limits: { minimum?: number; maximum?: number }) =>
	performanceIndex(
		{
			sampleSize: 50,
			mean: numberAt(inputs, 'mu'),
			standardDeviation: numberAt(inputs, 'sigma')
		},
		limits
	);

function subgroupIndex({ inputs }: Row, isWithin: boolean): number {
	const groups = groupsAt(inputs, 'subgroups');
	const values = groups.flat();
	const pooled = Math.sqrt(lotComponents(groups.map(groupSums)).within.meanSquare);
	return performanceIndex(
		{
			sampleSize: values.length,
			mean: mean(values),
			standardDeviation: isWithin ? pooled : standardDeviation(values)
		},
		{ minimum: numberAt(inputs, 'LSL'), maximum: numberAt(inputs, 'USL') }
	);
}

const DISTRIBUTIONS: Readonly<Record<string, (args: readonly number[]) => number>> = {
	'norm.ppf': ([p = NaN]) => normalQuantile(p),
	't.ppf': ([p = NaN, degrees = NaN]) => studentTQuantile(p, degrees),
	'chi2.ppf': ([p = NaN, degrees = NaN]) => chiSquareQuantile(p, degrees),
	'f.ppf': ([p = NaN, numerator = NaN, denominator = NaN]) =>
		fQuantile(p, { numerator, denominator }),
	'beta.ppf': ([p = NaN, a = NaN, b = NaN]) =>
		demonstratedContent(a + b - 1, { discarded: b, confidence: 1 - p }),
	'nct.cdf': ([t = NaN, degrees = NaN, delta = NaN]) => noncentralTLowerTail(t, degrees, delta),
	'nct.ppf': ([p = NaN, degrees = NaN, delta = NaN]) => noncentralTQuantile(p, degrees, delta)
};

/** Areas F and G: shape of a sample, quantiles, capability. */
export const SHAPE_CHECKS: readonly Check[] = [
	{
		name: 'Anderson–Darling statistic',
		covers: within('Anderson-Darling A^2'),
		value: (row) => andersonDarling(data(row)).statistic
	},
	{
		name: 'Anderson–Darling statistic, adjusted',
		covers: within('A^2* ='),
		value: (row) => andersonDarling(data(row)).adjusted
	},
	{
		name: 'Anderson–Darling probability',
		covers: within('Anderson-Darling p-value'),
		value: (row) => andersonDarling(data(row)).pValue
	},
	{
		name: 'Anderson–Darling probability far out',
		covers: identifier(/^F-faithful_eruptions-AD_p$/),
		value: () => andersonDarlingPValue(17.3053733)
	},
	{
		name: 'Anderson–Darling probability as a function',
		covers: quantity('F', 'p-value function'),
		value: ({ inputs }) => andersonDarlingPValue(numberAt(inputs, 'A2star'))
	},
	{
		name: 'Anderson–Darling critical values',
		covers: quantity('F', 'critical value of A^2*'),
		value: ({ inputs }) =>
			findRoot((a) => andersonDarlingPValue(a) - numberAt(inputs, 'alpha'), 0.6, 3)
	},
	{
		name: 'skewness',
		covers: within('moment skewness'),
		value: (row) => skewness(data(row))
	},
	{
		name: 'median absolute deviation, scaled by the constant of the rows',
		covers: within('scaled MAD'),
		value: (row) => 1.4826 * normalQuantile(0.75) * robustSpread(Float64Array.from(data(row))).scale
	},
	{
		name: 'normal quartiles',
		covers: quantity('F', '2*Phi^-1(0.75)', 'Phi^-1(0.75)'),
		value: ({ quantity: words }) => (words.startsWith('2') ? 2 : 1) * normalQuantile(0.75)
	},
	{
		name: 'quantiles, type 8',
		covers: quantity('G', 'sample quantile, Hyndman-Fan type 8'),
		value: (row) =>
			quantile(
				data(row).toSorted((a, b) => a - b),
				numberAt(row.inputs, 'p')
			)
	},
	{
		name: 'performance index, both limits',
		covers: identifier(/^G-nist-Cpk$/),
		value: (row) =>
			nistIndex(row, {
				minimum: numberAt(row.inputs, 'LSL'),
				maximum: numberAt(row.inputs, 'USL')
			})
	},
	{
		name: 'performance index, one limit',
		covers: identifier(/^G-nist-Cp[ul]$/),
		value: (row) =>
			nistIndex(
				row,
				row.id.endsWith('u')
					? { maximum: numberAt(row.inputs, 'USL') }
					: { minimum: numberAt(row.inputs, 'LSL') }
			)
	},
	{
		name: 'share beyond a limit, by index',
		covers: quantity('G', 'one-sided ppm', 'two-sided ppm'),
		value: ({ inputs }) =>
			inputs['Cp'] === undefined
				? 1e6 * normalUpperTail(3 * numberAt(inputs, 'Cpk'))
				: 2e6 * normalUpperTail(3 * numberAt(inputs, 'Cp'))
	},
	{
		name: 'bound of the performance index',
		covers: quantity('G', '95% lower confidence bound for Cpk'),
		value: ({ inputs }) =>
			performanceIndexLowerBound(numberAt(inputs, 'Cpk_hat'), {
				sampleSize: numberAt(inputs, 'n'),
				confidence: numberAt(inputs, 'confidence')
			})
	},
	{
		name: 'exact bound of an index with one limit',
		covers: quantity('G', 'exact 95% lower confidence bound'),
		value: ({ inputs }) =>
			oneSidedIndexLowerBound(numberAt(inputs, 'Cpu_hat'), {
				sampleSize: numberAt(inputs, 'n'),
				confidence: numberAt(inputs, 'confidence')
			})
	},
	{
		name: 'bound of a deviation by chi-square',
		covers: quantity('G', '95% lower bound for Cp/Cp_hat'),
		value: ({ inputs }) => {
			const degrees = numberAt(inputs, 'n') - 1;
			return Math.sqrt(chiSquareQuantile(1 - numberAt(inputs, 'confidence'), degrees) / degrees);
		}
	},
	{
		name: 'index of a limit set at the tolerance factor',
		covers: quantity('G', 'smallest observed Cpu'),
		value: ({ inputs }) => oneSidedToleranceFactor(numberAt(inputs, 'n'), promiseOf(inputs)) / 3
	},
	{
		name: 'index of subgroups',
		covers: identifier(/^G-(Cpk-within|Ppk-overall)$/),
		value: (row) => subgroupIndex(row, row.id === 'G-Cpk-within')
	},
	{
		name: 'deviation of subgroups together',
		covers: identifier(/^G-sigma-overall$/),
		value: ({ inputs }) => standardDeviation(groupsAt(inputs, 'subgroups').flat())
	},
	{
		name: 'gamma function by c4',
		covers: identifier(/^G-c4-/),
		value: ({ inputs }) => {
			const n = numberAt(inputs, 'n');
			return Math.sqrt(2 / (n - 1)) * Math.exp(logGamma(n / 2) - logGamma((n - 1) / 2));
		}
	},
	{
		name: 'distribution functions',
		covers: quantity('G', 'distribution function value'),
		value: ({ inputs, quantity: words }) => {
			const name = words.replace('distribution function value scipy.stats.', '');
			return DISTRIBUTIONS[name]?.(numbersAt(inputs, 'args')) ?? NaN;
		}
	}
];
