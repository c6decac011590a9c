const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

/** Sentences of the C–V screen. */
export const cvMessages = {
	fittingAt: (temperatureCelsius: number) =>
		`Fitting the sweeps at ${String(temperatureCelsius).replace('-', '\u2212')} °C`,
	fitted: (devices: number) => `${plural(devices, 'sweep')} fitted`,
	fitsUnderway: () =>
		'The sweeps are being fitted, device by device. The result arrives here by itself.',
	fitsFailed: (why: string) => `The sweeps could not be fitted: ${why}`,
	noFits: () =>
		'There are fewer biases here than the law has parameters (four), so nothing is fitted. Measure more biases.',
	tooFewReadings: (count: number) =>
		`${plural(count, 'device has', 'devices have')} fewer readings than the law has parameters`,
	notIdentifiable: (count: number) =>
		`${plural(count, 'device does', 'devices do')} not tell the parameters apart`,
	notConverged: (count: number) => `${plural(count, 'fit')} did not end`,
	allFitted: () => 'Every fit ended, and every device tells its parameters apart.',
	atBound: (symbol: string, count: number) =>
		`${plural(count, 'device has', 'devices have')} ${symbol} at its bound`,
	noDieFacts: () =>
		'The die of this product has no area and material yet. With them there is a 1/C² line and a doping profile.',
	noLine: () =>
		'1/C² does not rise with reverse bias inside the window, or has fewer than three readings there. Choose another window.',
	chargeFrom: (bias: number) =>
		`Integrated from 0 V to ${bias} V, the highest bias measured, on the fitted law with the residuals added.`,
	negativeComponent: () => 'A negative estimate is shown as 0.',
	noComponents: () =>
		'Shares need two lots or more, and a lot with two devices that differ. Measure further lots.',
	noModel: () =>
		'There are too few biases at this temperature and frequency to fit a SPICE model. Measure four or more.',
	moreLots: (count: number) => plural(count, 'further lot'),
	moreDevices: (count: number) => plural(count, 'further device'),
	enough: () => 'enough'
} as const;
