const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

const quoted = (got: string | undefined) => (got === undefined ? 'nothing' : `"${got}"`);

export const limitMessages = {
	methodNotYet: (method: string) =>
		`Limits of the method “${method}” aren't computed before the engine's next step. Choose a policy with “normal” or “sigma”.`,
	bothTailsNotYet: () =>
		'Content between both limits together isn’t computed before the engine’s next step. Choose a policy that promises each limit on its own.',
	tooFewLots: (required: number, actual: number) =>
		`The policy asks for at least ${plural(required, 'independent lot')}; ${plural(actual, 'lot')} ${actual === 1 ? 'is' : 'are'} measured.`,
	tooFewDevices: (required: number, actual: number) =>
		`The policy asks for at least ${plural(required, 'device')}; ${plural(actual, 'device')} ${actual === 1 ? 'is' : 'are'} measured.`,
	biasNotMeasured: (bias: number, measured: readonly number[]) => {
		const lowest = Math.min(...measured);
		const highest = Math.max(...measured);
		return bias < lowest || bias > highest
			? `${bias} V lies outside of the measured range, ${lowest} V to ${highest} V.`
			: `${bias} V was not measured; a limit needs measured devices at its own bias.`;
	},
	temperatureNotMeasured: (temperature: number, measured: readonly number[]) =>
		measured.length === 0
			? 'No capacitance of this product is measured yet.'
			: `Capacitance was not measured at ${temperature} °C; it was at ${measured.map((at) => `${at} °C`).join(', ')}.`,
	frequencyNotMeasured: (frequency: number, measured: readonly number[]) =>
		`Capacitance was not measured at ${frequency} Hz; it was at ${measured.map((at) => `${at} Hz`).join(', ')}.`,
	severalFrequencies: (measured: readonly number[]) =>
		`Capacitance was measured at ${measured.map((at) => `${at} Hz`).join(' and ')}; say which is meant.`,
	noSuchPolicy: (id: number | undefined) =>
		id === undefined ? 'There is no limit policy yet.' : `There is no policy version ${id}.`,
	noSuchProduct: (partNumber: string) => `There is no product ${partNumber}.`,
	computingAt: (temperature: number) => `Distributions at ${temperature} °C`,
	computed: (count: number) => `${plural(count, 'distribution')} computed`,
	expectsTemperature: (got: string | undefined) =>
		`temperatureCelsius: expected a number of °C, got ${quoted(got)}.`,
	expectsFrequency: (got: string | undefined) =>
		`frequency: expected a number of Hz above zero, got ${quoted(got)}.`,
	expectsBiases: (got: string | undefined) =>
		`biases: expected at most 1000 numbers of V with commas between, got ${quoted(got)}.`,
	expectsPolicy: (got: string | undefined) =>
		`policy: expected the id of a policy version, got ${quoted(got)}.`,
	expectsBasis: (got: string | undefined, known: readonly string[]) =>
		`basis: expected one of ${known.join(', ')}, got ${quoted(got)}.`,
	computing: (hasOlder: boolean) =>
		hasOlder
			? 'Distributions are computed from newer data. The numbers below are the previous ones until then; this page follows by itself.'
			: 'Distributions are computed from the accepted measurements. This page follows by itself.',
	waitsForTurn: () => 'Waits for its turn',
	nothingYetTitle: () => 'No capacitance is measured yet',
	caution: () =>
		'Typical values are medians and not guaranteed. Statistical limits rest on the lots measured and don’t replace production test. Each number leads to its derivation.',
	noDistributions: () =>
		'This product has no distributions yet: accept a measurement set, and its limits follow.',
	sigmaNeedsTest: (k: number) =>
		`The mean ± ${k} σ promises nothing by itself. It is printed only behind a test of every device, with the basis “tested”.`,
	medianOutside: () =>
		'The median lies outside of the computed limits: the values are too lopsided for a method that rests on the normal shape.',
	nothingLeft: () =>
		'Drift allowance and uncertainty use up the whole minimum; nothing is left to promise.',
	lotsDiffer: (lots: number, F: string, p: string) =>
		`The ${lots} lots differ (F\u00a0=\u00a0${F}, ${p}), and pooling them hides it: the limit speaks of these lots, not of future ones.`,
	contentBeyondSample: (content: number, devices: number) =>
		`Content ${content} speaks of about one device in ${Math.round(1 / (1 - content)).toLocaleString('en')}; ${devices} devices can't show so rare a one, so the limit rests on the normal shape alone.`,
	quarantined: (count: number) =>
		`${plural(count, 'sweep')} ${count === 1 ? 'waits' : 'wait'} in quarantine and ${count === 1 ? 'is' : 'are'} left out until a verdict is given.`,
	uncertaintyNotStated: () =>
		'No set states its uncertainty, so nothing is added for it; a systematic error of the tester would pass into the limit.',
	equalsTypical: (side: 'minimum' | 'maximum') =>
		`The ${side} equals the typical value at this resolution.`,
	rises: (
		column: 'minimum' | 'typical' | 'maximum',
		bias: number,
		text: string,
		before: number,
		beforeText: string
	) =>
		`The ${column} at ${bias} V (${text}) is above that at ${before} V (${beforeText}); capacitance doesn’t rise with reverse bias.`
};
