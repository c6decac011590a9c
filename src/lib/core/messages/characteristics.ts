const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

/** Sentences about readings and derived characteristics, and of their screen. */
export const characteristicMessages = {
	notMeasuredAt: (key: string, asked: string, stored: readonly string[]) =>
		`${key} is not stored at ${asked}; it is at ${stored.join('; ')}.`,
	severalConditions: (key: string, asked: string, stored: readonly string[]) =>
		`${key} is stored at several conditions that agree with ${asked}: ${stored.join('; ')}. Name one of them in the template.`,
	nothingStored: (key: string) => `No distribution of ${key} is stored.`,
	emptyTitle: () => 'No readings yet',
	empty: () =>
		'No reading of this product is stored, and its sweeps give nothing to derive. Upload a file of readings: lot, wafer, device, characteristic, conditions, value and unit.',
	censored: (below: number, above: number, of: number) =>
		[
			...(below > 0 ? [`${below} of ${of} at or below the floor`] : []),
			...(above > 0 ? [`${above} of ${of} at or above the clamp`] : [])
		].join(', '),
	atMost: (value: string) => `at most ${value}`,
	atLeast: (value: string) => `at least ${value}`,
	derived: () => 'computed device by device',
	lotsOf: (devices: number, lots: number) => `${plural(devices, 'device')}, ${plural(lots, 'lot')}`,
	observedOnly: () =>
		'Bars and lots show the devices with a number; censored ones are counted beside them and stand in the limits for what they say.',
	noSweeps: () =>
		'No sweep of a current is stored. Upload one, with a current beside each bias, and the families stand here.',
	noForwardFit: (why: string) =>
		`The law V = n·(kT/q)·ln(I/I_s + 1) + I·R_s can’t be fitted to the median curve: ${why}`,
	noCheung: (why: string) => `The second method gives nothing here: ${why}`,
	familyNote: (devices: number) =>
		`Medians of ${plural(devices, 'device')}; no single device is sent.`,
	arrheniusNeedsTwo: () =>
		'An activation energy needs the reverse current at one condition and at two temperatures or more.',
	activationEnergy: (energy: string, bias: string) =>
		`Activation energy ${energy} eV from the medians at ${bias}.`,
	medianCensored: (temperature: string) =>
		`The median at ${temperature} rests on censored readings and is left out.`
};
