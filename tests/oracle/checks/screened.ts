import { mean } from '../../../src/lib/core/stats/mean';
import { normalQuantile } from '../../../src/lib/core/stats/normalQuantile';
import { regressionLine } from '../../../src/lib/core/stats/regressionLine';
import {
	edgeRule,
	oneSidedRegressionFactor,
	twoSidedRegressionFactor
} from '../../../src/lib/core/stats/regressionTolerance';
import {
	attenuatedCorrelation,
	screenedEdge,
	screenedMoments,
	screenedQuantile,
	screenYield
} from '../../../src/lib/core/stats/screenedNormal';
import { standardDeviation } from '../../../src/lib/core/stats/standardDeviation';
import { oneSidedToleranceFactor } from '../../../src/lib/core/stats/toleranceFactor';
import { twoSidedFactor } from '../../../src/lib/core/stats/twoSidedFactor';
import { identifier, quantity, type Check } from '../check';
import { numberAt, numbersAt, promiseOf, type Row } from '../rows';
import { columnOf } from '../tables';

const screenOf = ({ inputs }: Row) => ({
	correlation: numberAt(inputs, 'rho'),
	lowest: numberAt(inputs, 'a'),
	highest: numberAt(inputs, 'b')
});

const norris = () =>
	regressionLine(columnOf('nist_norris.csv', 'x'), columnOf('nist_norris.csv', 'y'));

const logs = (name: string) => columnOf('screen_pairs_synthetic.csv', name).map(Math.log);
const pairs = () => regressionLine(logs('C_at_1V_pF'), logs('C_at_8V_pF'));

function screened({ inputs }: Row) {
	const [lowest = NaN, highest = NaN] = numbersAt(inputs, 'screen_pF').map(Math.log);
	return edgeRule(pairs(), { lowest, highest }, promiseOf(inputs));
}

const PAIR_VALUES: Readonly<Record<string, () => number>> = {
	'M-norris-B1': () => norris().slope,
	'M-syn-a': () => pairs().intercept,
	'M-syn-b': () => pairs().slope,
	'M-syn-s': () => pairs().residualDeviation,
	'M-syn-xb': () => pairs().meanX,
	'M-syn-sxx': () => pairs().sumOfSquaresX,
	'M-syn-corr': () => pairs().correlation
};

/** Area M: guarantees behind a screen. */
export const SCREENED_CHECKS: readonly Check[] = [
	{
		name: 'lines through pairs',
		covers: (row) => Object.hasOwn(PAIR_VALUES, row.id),
		value: (row) => PAIR_VALUES[row.id]?.() ?? NaN
	},
	{
		name: 'quantile behind a screen',
		covers: quantity('M', 'quantile of standardised Y', 'lower 1% quantile'),
		value: (row) => screenedQuantile(numberAt(row.inputs, 'p'), screenOf(row))
	},
	{
		name: 'bound at the edge of a screen',
		covers: quantity('M', 'distribution-free-in-X'),
		value: ({ inputs }) =>
			screenedEdge(numberAt(inputs, 'b'), {
				correlation: numberAt(inputs, 'rho'),
				content: numberAt(inputs, 'p')
			})
	},
	{
		name: 'mean behind a screen',
		covers: quantity('M', 'E[Y | screen]'),
		value: (row) => screenedMoments(screenOf(row)).mean
	},
	{
		name: 'variance behind a screen',
		covers: quantity('M', 'Var[Y | screen]'),
		value: (row) => screenedMoments(screenOf(row)).variance
	},
	{
		name: 'yield of a screen',
		covers: quantity('M', 'screen yield'),
		value: ({ inputs }) =>
			screenYield({ lowest: numberAt(inputs, 'a'), highest: numberAt(inputs, 'b') })
	},
	{
		name: 'benefit of a screen',
		covers: quantity('M', 'screened / unscreened'),
		value: ({ inputs }) => {
			const screen = { correlation: numberAt(inputs, 'rho'), lowest: -2, highest: 2 };
			return screenedQuantile(0.99865, screen) / normalQuantile(0.99865);
		}
	},
	{
		name: 'correlation through a noisy tester',
		covers: quantity('M', 'correlation seen through'),
		value: ({ inputs }) =>
			attenuatedCorrelation(numberAt(inputs, 'rho'), numberAt(inputs, 'u_over_sigma'))
	},
	{
		name: 'one-sided factor on a line',
		covers: quantity('M', 'one-sided regression tolerance factor'),
		value: ({ inputs }) =>
			oneSidedRegressionFactor(norris(), numberAt(inputs, 'x0'), promiseOf(inputs))
	},
	{
		name: 'two-sided factor on a line',
		covers: quantity('M', 'two-sided regression tolerance factor'),
		value: ({ inputs }) =>
			twoSidedRegressionFactor(norris(), numberAt(inputs, 'x0'), promiseOf(inputs))
	},
	{
		name: 'upper limit on a line',
		covers: quantity('M', 'one-sided 99/95 upper limit'),
		value: ({ inputs }) => {
			const highest = numberAt(inputs, 'x0');
			return edgeRule(norris(), { highest }, promiseOf(inputs)).maximum ?? NaN;
		}
	},
	{
		name: 'two-sided factor at the mean of a line',
		covers: identifier(/^M-ktwo-reduces/),
		value: ({ inputs }) =>
			twoSidedFactor(
				{ centreVariance: numberAt(inputs, 'd2'), degrees: numberAt(inputs, 'nu') },
				promiseOf(inputs)
			)
	},
	{
		name: 'edge rule, maximum and minimum',
		covers: quantity('M', 'guaranteed C max', 'guaranteed C min'),
		value: (row) => {
			const { minimum, maximum } = screened(row);
			return Math.exp((row.id.includes('-max-') ? maximum : minimum) ?? NaN);
		}
	},
	{
		name: 'limit without the screen',
		covers: quantity('M', '99/95 upper limit at 8 V'),
		value: ({ inputs }) => {
			const values = logs('C_at_8V_pF');
			const factor = oneSidedToleranceFactor(values.length, promiseOf(inputs));
			return Math.exp(mean(values) + factor * standardDeviation(values));
		}
	}
];
