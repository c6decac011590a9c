import type { Side } from '../limits/allowance';

const plural = (count: number, one: string, many = `${one}s`) =>
	`${count} ${count === 1 ? one : many}`;

type Edge = 'low' | 'high';
const EDGE_NAMES = { low: 'lower', high: 'upper' } as const satisfies Record<Edge, string>;

export const screenedMessages = {
	notJson: () => 'The body is not JSON.',
	pairsOrMoments: () =>
		'Give either `tested` and `limited`, or `means`, `deviations` and `correlation`.',
	limitedMissing: () => 'The values of the same devices at the limited condition are missing.',
	lengthsDiffer: (tested: number, other: number) =>
		`${plural(tested, 'tested value')} and ${other} here: one belongs to each device.`,
	fewPairs: (actual: number) => `A line through pairs needs at least 3 devices, got ${actual}.`,
	noSpread: () => 'The tested values don’t differ; no line can be drawn.',
	noSpreadOfRatio: () => 'The ratio doesn’t differ between devices; there is nothing to limit.',
	noLogarithm: (value: number) =>
		`ln needs a value above zero, got ${value}. Correct it, or use the transform “identity”.`,
	momentMissing: () => 'Is needed beside the means.',
	confidenceMissing: () =>
		'Is needed: only known parameters (means without `n`) leave no doubt to allow for.',
	fullCorrelation: () =>
		'A correlation of ±1 leaves no residual spread; known parameters need one between −1 and 1.',
	ratioNeedsLogarithms: () => 'Limits of a ratio rest on logarithms; use the transform “ln”.',
	windowMissing: () => 'The test limits at the tested condition are needed: `low`, `high` or both.',
	windowCrossed: () => 'The lower test limit must lie below the upper one.',
	windowNotPositive: (edge: Edge, value: number) =>
		`The ${EDGE_NAMES[edge]} test limit, widened by the uncertainty, is ${value}; ln needs one above zero.`,
	edgeMissing: (side: Side, edge: Edge, rises: boolean) =>
		`A ${side} rests on the ${EDGE_NAMES[edge]} test limit, because the line ${rises ? 'rises' : 'falls'}; it was not sent.`,
	nothingPasses: () => 'No device of this distribution would pass such a window.',

	line: (count: number) =>
		`Least squares of the limited on the tested quantity, transformed, ${plural(count, 'device')}.`,
	residual: () => '√(sum of squared residuals/(n − 2)).',
	momentsOf: (transform: string) =>
		`As sent: mean, deviation and correlation of the values (${transform}).`,
	ratioMoments: () =>
		'ln ratio = ln tested − ln limited, of each device: s² = s_t² + s_l² − 2ρ·s_t·s_l.',
	widened: (edge: Edge) =>
		`The ${EDGE_NAMES[edge]} test limit, moved out by the uncertainty of the tester, transformed.`,
	height: () => '1/n + (x − mean)²/Sxx at the edge: what the line itself is unsure of, in s².',
	edgeFactor: (content: number, confidence: number) =>
		`d·t′(${confidence}; n − 2, z/d), z the quantile of ${content}. Krishnamoorthy and Mathew 2009, section 3.2.`,
	edgeLimit: (side: Side, edge: Edge) =>
		`Height of the line at the ${EDGE_NAMES[edge]} edge ${side === 'maximum' ? '+' : '−'} factor × residual deviation: the worst device that passes.`,
	truncatedFactor: (content: number) =>
		`Quantile of the bivariate normal among the devices that pass, content ${content}, by quadrature.`,
	plainFactor: (content: number, confidence: number | undefined) =>
		confidence === undefined
			? `Quantile of ${content} of the normal distribution; nothing is screened.`
			: `One-sided tolerance factor, content ${content}, confidence ${confidence}; nothing is screened. Krishnamoorthy and Mathew 2009, section 2.2.`,
	meanLimit: (side: Side) => `Mean ${side === 'maximum' ? '+' : '−'} factor × deviation.`,
	backTransformed: (transform: string) =>
		transform === 'ln' ? 'exp of it.' : 'The same, not transformed.',

	confidenceShared: (confidence: number, each: number) =>
		`Minimum and maximum are promised at once; each has a confidence of ${each}, so that both hold with ${confidence}.`,
	distributionMustStay: () =>
		'The limits hold while production keeps the distribution at the tested condition; the edge rule beside them holds for any.',
	noGain: (side: Side) =>
		`The screen gives no gain for the ${side}: without it the limit would be at least as tight.`,

	rises: () =>
		'The line rises: the minimum rests on the lower test limit, the maximum on the upper.',
	falls: () =>
		'The line falls: the edges change places, the minimum rests on the upper test limit, the maximum on the lower.',
	linear: (statistic: string, p: string) =>
		`A bent line (square of the tested value added) gains F = ${statistic}, ${p}.`,
	even: (statistic: string, p: string) =>
		`Whether the spread changes with the tested value: Breusch–Pagan (Koenker) ${statistic}, ${p}.`,
	normal: (statistic: string, p: string) =>
		`Shape of the residuals: Anderson–Darling A² = ${statistic}, ${p}.`,
	inside: (low: string, high: string) =>
		`The widened test limits are compared with the characterized range, ${low} to ${high}.`,
	lotsAlike: (f: string, p: string) =>
		`Lots compared on the residuals, ${f}, ${p}: no difference is seen; that the lots are alike is not shown by it.`,
	lotsDiffer: (f: string, p: string) =>
		`Lots compared on the residuals, ${f}, ${p}: they differ beyond what the tested value says. The limits speak of these lots, not of future ones; test at the limited condition, or limit it by the method for lots.`,
	widenedBy: (low: string, high: string) =>
		`The window is widened by the uncertainty of the tester, to ${low} … ${high}.`,
	notWidened: () =>
		'No uncertainty of the tester was sent. That is right where the devices were characterized on the same tester.',
	noLotsSent: () => 'The lots of the devices were not sent.',
	oneLot: () => 'Lots can’t be compared: fewer than two, or no lot with more than one device.',
	summaryOnly: () => 'A summary doesn’t show it; send the pairs.',
	rangeNotSent: () => 'The range behind the summary was not sent (`testedRange`).',
	tooFewToTell: (required: number) => `Fewer than ${required} devices don’t show it.`,
	noResiduals: () => 'There are no residuals: every pair lies on the line.',
	failed: (names: readonly string[]) =>
		`Not a guarantee: ${names.join(', ')} ${names.length === 1 ? 'fails' : 'fail'}.`,
	notChecked: (names: readonly string[]) => `Not checked: ${names.join(', ')}.`
} as const;
