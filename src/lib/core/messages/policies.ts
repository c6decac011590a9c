/** What the editor of limit policies says. */
export const policyMessages = {
	nameNeeded: () => 'Give the policy a name.',
	tooLong: (most: number) => `At most ${most} characters.`,
	shareFormat: () => 'A share between 0 and 1, like 0.99.',
	factorFormat: () => 'A number above 0, at most 20.',
	lotsFormat: () => 'A whole number from 1 up.',
	devicesFormat: () => 'A whole number from 2 up.',
	driftFormat: () => 'A share like 0.5 %, or an amount in SI like 1e-13.',
	guardBandFormat: () => 'A number from 0 to 10, or nothing.',
	resolutionFormat: (kind: 'figures' | 'step') =>
		kind === 'step'
			? 'A step above 0, like 0.1.'
			: 'Significant figures, a whole number from 1 to 8.',
	wholeCurveNeedsLots: () => 'A promise along the whole curve is made by the method “lots” only.',
	lotsMethodNeeds: (lots: number) => `The method “lots” needs at least ${lots} lots.`
};
