import { chiSquareQuantile } from '../../../src/lib/core/stats/chiSquare';
import { mean } from '../../../src/lib/core/stats/mean';
import {
	demonstratedContent,
	largestDiscard,
	orderStatisticConfidence,
	requiredSampleSize
} from '../../../src/lib/core/stats/orderStatistics';
import { standardDeviation } from '../../../src/lib/core/stats/standardDeviation';
import { oneSidedToleranceFactor } from '../../../src/lib/core/stats/toleranceFactor';
import { twoSidedToleranceFactor } from '../../../src/lib/core/stats/twoSidedFactor';
import { identifier, quantity, type Check } from '../check';
import { numberAt, numbersAt, promiseOf, type Row } from '../rows';

const oneSided = ({ inputs }: Row) =>
	oneSidedToleranceFactor(numberAt(inputs, 'n'), promiseOf(inputs));
const twoSided = ({ inputs }: Row) =>
	twoSidedToleranceFactor(numberAt(inputs, 'n'), promiseOf(inputs));

function lowerLimit({ inputs }: Row, transform: (value: number) => number): number {
	const values = numbersAt(inputs, 'data').map(transform);
	const factor = oneSidedToleranceFactor(values.length, promiseOf(inputs));
	return mean(values) - factor * standardDeviation(values);
}

/** Areas A, B and C: factors of one normal sample, and order statistics. */
export const FACTOR_CHECKS: readonly Check[] = [
	{
		name: 'one-sided factors, computed and printed',
		covers: quantity('A', 'one-sided normal tolerance factor', 'k1 ISO', 'k1 ->'),
		value: oneSided
	},
	{
		name: 'lower limit of a normal sample',
		covers: quantity('A', 'lower normal tolerance limit'),
		value: (row) => lowerLimit(row, (value) => value)
	},
	{
		name: 'lower limit of a lognormal sample',
		covers: quantity('A', 'lower lognormal tolerance limit'),
		value: (row) => Math.exp(lowerLimit(row, Math.log))
	},
	{
		name: 'two-sided factors, computed and printed',
		covers: quantity('B', 'exact two-sided', 'two-sided normal', 'two-sided tolerance factor'),
		value: twoSided
	},
	{
		name: 'quantile of chi-square',
		covers: quantity('B', 'chi-square lower quantile'),
		value: ({ inputs }) => chiSquareQuantile(numberAt(inputs, 'prob'), numberAt(inputs, 'df'))
	},
	{
		name: 'two-sided above one-sided',
		covers: quantity('B', 'k2 exceeds k1'),
		value: (row) => twoSided(row) - oneSided(row)
	},
	{
		name: 'sample size for order statistics',
		covers: quantity('C', 'minimum n'),
		value: ({ inputs }) => requiredSampleSize(promiseOf(inputs), numberAt(inputs, 'm'))
	},
	{
		name: 'rank of order statistics',
		covers: quantity('C', 'largest usable', 'total number m', 'n=300'),
		value: ({ inputs }) => largestDiscard(numberAt(inputs, 'n'), promiseOf(inputs))
	},
	{
		name: 'confidence of order statistics',
		covers: quantity('C', 'achieved confidence'),
		value: ({ inputs }) =>
			orderStatisticConfidence(numberAt(inputs, 'n'), {
				discarded: numberAt(inputs, 'm'),
				content: numberAt(inputs, 'content')
			})
	},
	{
		name: 'content a sample speaks for',
		covers: (row) =>
			quantity('C', 'content guaranteed')(row) || identifier(/^K-q101-(content|77)/)(row),
		value: ({ inputs, quantity: words }) =>
			demonstratedContent(numberAt(inputs, 'n'), {
				discarded: words.includes('m=2') ? 2 : 1,
				confidence: numberAt(inputs, 'confidence')
			})
	},
	{
		name: 'distribution-free limit',
		covers: quantity('C', 'distribution-free'),
		value: ({ inputs }) => {
			const sorted = numbersAt(inputs, 'data').toSorted((a, b) => a - b);
			const promise = { content: 0.9, confidence: 0.95 };
			return sorted[largestDiscard(sorted.length, promise) - 1] ?? NaN;
		}
	}
];
