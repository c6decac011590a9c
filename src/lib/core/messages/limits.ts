const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

const quoted = (got: string | undefined) => (got === undefined ? 'nothing' : `"${got}"`);

export const limitMessages = {
	enteredHasNoLots: () =>
		'Limits for future lots need the devices of at least three lots; this distribution was entered as a summary and says nothing of its lots.',
	enteredLotsUnknown: (required: number) =>
		`The policy asks for at least ${plural(required, 'independent lot')}; an entered summary says nothing of its lots.`,
	lotsNeedLots: (required: number, actual: number) =>
		`Limits for future lots need at least ${plural(required, 'independent lot')} (wafer lots); ${plural(actual, 'lot')} ${actual === 1 ? 'is' : 'are'} measured. Measure more lots, or test every device.`,
	lotsNeedRepeats: () =>
		'Limits for future lots need lots with two devices at least; with one device a lot nothing shows the spread inside a lot.',
	lotsNeedNumbers: () =>
		'Limits for future lots need a number from every device; some readings here are censored. Choose a policy with “order” or “normal”.',
	wholeCurveNeedsLots: (method: string) =>
		`A promise along the whole curve is made by the method “lots” only, not by “${method}”.`,
	wholeCurveNotSimulated: () =>
		'The factor for the whole curve is not there: it is being simulated, or no device was measured at every bias.',
	bothTailsNeedNumbers: () =>
		'Content between both limits together needs a number from every device; some readings here are censored. Choose a policy that promises each limit on its own.',
	censoredNeedReadings: () =>
		'Too few readings are numbers: at least three different ones are needed beside the censored ones.',
	orderNeedsDevices: () =>
		'Order statistics need the devices themselves; only a summary of this distribution is kept.',
	orderNeedsMore: (required: number, actual: number, sides: number) =>
		`Order statistics need at least ${plural(required, 'device')}${sides > 1 ? ' for each side' : ''} at this content and confidence; ${plural(actual, 'device')} ${actual === 1 ? 'is' : 'are'} measured.`,
	rankCensored: (side: 'minimum' | 'maximum', rank: number) =>
		side === 'minimum'
			? `The device that would be the minimum, rank ${rank} from below, lies at or below the floor of the instrument; no minimum can be promised.`
			: `The device that would be the maximum, rank ${rank} from above, lies at or above the clamp of the instrument; no maximum can be promised.`,
	noLogarithm: (place: string, transform: string, value: number) =>
		`${place}: ${transform} needs a value above zero, got ${value}. Mark readings at the floor as censored, or use “identity”.`,
	notJson: () => 'Send values and a policy as JSON.',
	notNormal: (statistic: string, p: string) =>
		`The devices don’t follow the normal shape within their lots (Anderson–Darling A²\u00a0=\u00a0${statistic}, ${p}); the method rests on it.`,
	enteredSummary: () =>
		'The distribution was entered as a summary; no measured devices stand behind it, and it can’t be recomputed.',
	censored: (count: number, sampleSize: number) =>
		`${count} of ${plural(sampleSize, 'reading')} ${count === 1 ? 'is' : 'are'} censored and counted for what they say, not as values.`,
	tooFewLots: (required: number, actual: number) =>
		`The policy asks for at least ${plural(required, 'independent lot')}; ${plural(actual, 'lot')} ${actual === 1 ? 'is' : 'are'} measured.`,
	tooFewDevices: (required: number, actual: number) =>
		`The policy asks for at least ${plural(required, 'device')}; ${plural(actual, 'device')} ${actual === 1 ? 'is' : 'are'} measured.`,
	biasNotMeasured: (bias: number, measured: readonly number[]) => {
		const lowest = Math.min(...measured);
		const highest = Math.max(...measured);
		return bias < lowest || bias > highest
			? `${bias} V lies outside of the measured range, ${lowest} V to ${highest} V.`
			: `${bias} V was not measured, and no sweep reaches across it.`;
	},
	biasUnderway: (bias: number) =>
		`${bias} V was not measured itself; its values are being interpolated within each sweep.`,
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
	contradicted: (
		side: 'minimum' | 'maximum',
		limit: string,
		of: { readonly outside: number; readonly allowed: number; readonly sampleSize: number }
	) =>
		`${of.outside} of ${plural(of.sampleSize, 'device')} ${of.outside === 1 ? 'lies' : 'lie'} beyond the ${side} of ${limit}; its basis allows ${of.allowed}. Ask first what becomes of the lot.`,
	noLongerComputed: (side: 'minimum' | 'maximum', why: string) =>
		`The ${side} can no longer be computed. ${why}`,
	unsupported: (side: 'minimum' | 'maximum', limit: string, now: string) =>
		`The data of today supports a ${side} of ${now} only, looser than the published ${limit}.`,
	moved: (side: 'minimum' | 'maximum', limit: string, now: string) =>
		`The ${side} would be ${now} today; ${limit} is published.`,
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
