import { limitationMessages } from '../messages/limitations';
import type { LimitMethod } from './policy';

/** What of a limit decides whether a limitation concerns it. */
export interface LimitedCase {
	/** A method of a policy, or what is built on one. */
	readonly method: LimitMethod | 'whole curve' | 'screened';
	/** Devices of each independent lot. */
	readonly lotSizes: readonly number[];
}

/**
 * A case in which a limit carries less confidence than it states. Found by `npm run confidence`,
 * which fails when a case is missing here, and when one here no longer shows.
 */
export interface Limitation {
	readonly name: LimitationName;
	/** The share of variance between lots from which it shows, or up to which. */
	readonly lotShare: { readonly from: number } | { readonly upTo: number };
	readonly concerns: (of: LimitedCase) => boolean;
	/** The sentence shown beside the limit. */
	readonly sentence: () => string;
}

export type LimitationName = 'pooled lots' | 'lots beside the line' | 'very unequal lots';

/** From this ratio of mean to harmonic mean on, the sizes of lots are very unequal. */
const VERY_UNEQUAL = 2.5;

/** How much larger the mean size of lots is than their harmonic mean; 1 for lots alike. */
function inequality(sizes: readonly number[]): number {
	const sum = sizes.reduce((total, size) => total + size, 0);
	const inverse = sizes.reduce((total, size) => total + 1 / size, 0);
	return (sum * inverse) / sizes.length ** 2;
}

export const LIMITATIONS: readonly Limitation[] = [
	{
		name: 'pooled lots',
		lotShare: { from: 0.01 },
		concerns: ({ method, lotSizes }) =>
			(method === 'normal' || method === 'order') && lotSizes.length > 1,
		sentence: limitationMessages.pooledLots
	},
	{
		name: 'lots beside the line',
		lotShare: { from: 0.01 },
		concerns: ({ method, lotSizes }) => method === 'screened' && lotSizes.length > 1,
		sentence: limitationMessages.lotsBesideTheLine
	},
	{
		name: 'very unequal lots',
		lotShare: { upTo: 0.3 },
		concerns: ({ method, lotSizes }) =>
			(method === 'lots' || method === 'whole curve') && inequality(lotSizes) > VERY_UNEQUAL,
		sentence: limitationMessages.veryUnequalLots
	}
];

/** The limitations that concern a limit, whatever its lots' share of the variance may be. */
export function limitationsOf(of: LimitedCase): readonly Limitation[] {
	return LIMITATIONS.filter(({ concerns }) => concerns(of));
}
