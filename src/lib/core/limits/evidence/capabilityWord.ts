export type CapabilityWord = 'very capable' | 'capable' | 'barely capable' | 'not capable';

/**
 * What a lower bound of Ppk is called: 1.67 and 1.33 are the steps that customers ask for, 1 is
 * three deviations to the nearer limit. Common practice, no source.
 */
export const CAPABILITY_WORDS: readonly { readonly from: number; readonly word: CapabilityWord }[] =
	[
		{ from: 1.67, word: 'very capable' },
		{ from: 1.33, word: 'capable' },
		{ from: 1, word: 'barely capable' }
	];
