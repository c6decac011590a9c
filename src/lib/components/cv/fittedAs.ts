import type { LetterSymbol } from '$lib/core/characteristics/symbol';
import type { DistributionOfFits, Fitted } from '$lib/core/distributions/sweepFits';

/** How each fitted number is called and in what it is shown. */
export const FITTED_AS = {
	zeroBiasCapacitance: {
		symbol: { quantity: 'C', subscript: 'j0' },
		words: 'C_j0',
		kind: 'capacitance'
	},
	junctionPotential: { symbol: { quantity: 'V', subscript: 'j' }, words: 'V_j', kind: 'voltage' },
	gradingExponent: { symbol: { quantity: 'M' }, words: 'M', kind: 'number' },
	caseCapacitance: {
		symbol: { quantity: 'C', subscript: 'case' },
		words: 'C_case',
		kind: 'capacitance'
	},
	residualRms: { symbol: null, words: 'Residual rms', kind: 'share' }
} as const satisfies Record<
	Fitted,
	{
		readonly symbol: LetterSymbol | null;
		readonly words: string;
		readonly kind: 'capacitance' | 'voltage' | 'number' | 'share';
	}
>;

export function quantileOf(of: DistributionOfFits, probability: number): number | undefined {
	return of.quantiles.find((each) => each.probability === probability)?.value;
}

/** The lots whose medians lie outermost; `undefined` where no lot has one. */
export function outermostLots({ lots }: DistributionOfFits) {
	const known = lots
		.flatMap(({ name, median }) => (median === null ? [] : [{ name, median }]))
		.sort((a, b) => a.median - b.median);
	const [lowest, highest] = [known[0], known.at(-1)];
	return lowest && highest && { lowest, highest };
}
