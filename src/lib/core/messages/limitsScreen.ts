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
		readonly same: number;
	}) => {
		const said = [
			...(of.tighter > 0 ? [`${plural(of.tighter, 'limit tightens', 'limits tighten')}`] : []),
			...(of.looser > 0 ? [`${plural(of.looser, 'limit loosens', 'limits loosen')}`] : []),
			...(of.gained > 0 ? [`${plural(of.gained, 'limit appears', 'limits appear')}`] : []),
			...(of.lost > 0
				? [`${plural(of.lost, 'limit is', 'limits are')} refused or not promised`]
				: [])
		];
		if (said.length === 0) return 'No printed limit changes.';
		return `${said.join(', ')}${of.same > 0 ? '; the others stay' : ''}.`;
	},
	sample: (devices: number, lots: number) => `${plural(devices, 'device')}, ${plural(lots, 'lot')}`,
	needsDevices: (count: number) => `${plural(count, 'device')} a side would be needed.`,
	withoutLots: (left: readonly string[], lots: number, devices: number) =>
		`Without ${left.join(', ')} (${plural(lots, 'lot')} with ${plural(devices, 'device')} left).`,
	circular: () =>
		'Circular: the limit came from these same devices, so that the index says little of it.',
	limitUnread: (side: 'minimum' | 'maximum') =>
		`The ${side} has to be a number above zero, like 14.2, or be left empty.`,
	decidesNothing: () => 'These are the digits that are printed already; nothing is to be decided.',
	outOfOrder: (lower: string, upper: string) => `The ${lower} would lie above the ${upper}.`,
	tooManyOutside: (
		side: 'minimum' | 'maximum',
		limit: string,
		of: {
			readonly count: number | null;
			readonly allowed: number;
			readonly sampleSize: number;
			readonly basis: string;
		}
	) =>
		`${of.count ?? 'Many'} of ${plural(of.sampleSize, 'device')} lie beyond a ${side} of ${limit}; “${of.basis}” allows ${of.allowed}. Choose a wider limit, or say in the reason what becomes of those devices and tick that they are meant to lie outside.`,
	uncertaintyUnread: () => 'U has to be a number from zero up, in the unit of the table.',
	nothingMeasuredHere: () => 'Nothing is measured at this condition, so no limit can be decided.',
	nothingToTakeBack: () => 'No decision stands here; the machine’s limits are printed.',
	decided: () => 'Decided. The machine’s limits stand beside it in the derivation.',
	takenBack: () => 'Taken back. The machine’s limits are printed again.',
	policyUnchanged: (name: string) => `${name} says the same already; no version was made.`,
	policyNameTaken: (name: string) => `There is a policy named ${name} already.`,
	policyNameWithoutLetters: () => 'A name has at least one letter or digit.',
	policyMovedMeanwhile: (number: number) =>
		`Somebody made version ${number} meanwhile. What you typed is kept; compare, then save again.`,
	policySaved: (name: string, number: number) => `${name}, version ${number}, is made.`,
	policyNotFound: () => 'There is no such limit policy.',
	olderPolicy: (name: string, used: number, newest: number) =>
		`${name} has a version ${newest}; this is computed by version ${used}.`,
	notAsked: () => 'The trial could not be computed just now; the stored limits stand unchanged.'
};
