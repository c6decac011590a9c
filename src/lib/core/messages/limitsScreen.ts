const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

/** What the limits screen says of trials, overrides and policies. */
export const limitsScreenMessages = {
	noLotLeft: () => 'No lot is left in: tick one at least.',
	lotsOfCensored: () =>
		'Lots can’t be left out here: some readings are censored, and the stored sums don’t tell them by lot.',
	expectsShare: (got: string) => `Expected a share between 0 and 1, like 0.99; got “${got}”.`,
	expectsDrift: (got: string) => `Expected a drift from 0 to less than 100 %; got “${got}”.`,
	expectsGuardBand: (got: string) => `Expected a factor r from 0 to 10; got “${got}”.`,
	expectsChoice: (field: string, got: string) => `There is no ${field} “${got}”.`,
	notSaved: () => 'Not saved.',
	tryWithoutSaving: () => 'Change anything to see the limits it would give. Nothing is saved.',
	eachBiasOnly: () =>
		'The stored policy promises the whole curve; the trial promises each bias on its own, because the factor of a curve is simulated.',
	differences: (of: {
		readonly tighter: number;
		readonly looser: number;
		readonly gained: number;
		readonly lost: number;
	}) => {
		const said = [
			...(of.tighter > 0 ? [`${plural(of.tighter, 'limit tightens', 'limits tighten')}`] : []),
			...(of.looser > 0 ? [`${plural(of.looser, 'limit loosens', 'limits loosen')}`] : []),
			...(of.gained > 0 ? [`${plural(of.gained, 'limit appears', 'limits appear')}`] : []),
			...(of.lost > 0
				? [`${plural(of.lost, 'limit is', 'limits are')} refused or not promised`]
				: [])
		];
		return said.length === 0 ? 'No printed limit changes.' : `${said.join(', ')}; the others stay.`;
	},
	needsDevices: (count: number) => `${plural(count, 'device')} a side would be needed.`,
	withoutLots: (left: readonly string[], lots: number, devices: number) =>
		`Without ${left.join(', ')} (${plural(lots, 'lot')} with ${plural(devices, 'device')} left).`,
	circular: () =>
		'Circular: the limit came from these same devices, so that the index says little of it.',
	notAsked: () => 'The trial could not be computed just now; the stored limits stand unchanged.'
};
