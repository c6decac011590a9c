import { normalQuantile } from '../../stats/normalQuantile';
import { edgeRule } from '../../stats/regressionTolerance';
import { screenedEdge, screenedQuantile, screenYield } from '../../stats/screenedNormal';
import { oneSidedToleranceFactor } from '../../stats/toleranceFactor';
import type { Side } from '../allowance';
import type { ScreenedSource } from './screenedSource';
import type { ScreenWindow } from './screenWindow';

/** How the limits were found. */
export type ScreenedMethod = 'edge-rule' | 'truncated-normal' | 'unscreened';

/** A limit of the transformed quantity. */
export interface Margin {
	readonly limit: number;
	/** In residual deviations for the edge rule, otherwise in deviations of the quantity. */
	readonly factor: number;
	/** Where on x it rests; only the edge rule has such a place. */
	readonly edge?: number;
}

/** What each limit promises on its own. */
export interface EachPromise {
	readonly content: number;
	/** Known parameters leave no doubt to allow for. */
	readonly confidence: number;
}

type Margins = Readonly<Partial<Record<Side, Margin>>>;

/**
 * The limits of devices that pass the window, finite sample: the regression tolerance bound at the
 * edges themselves. A side whose edge was not sent is left out.
 */
export function edgeMargins(
	{ line }: ScreenedSource & { readonly line: NonNullable<ScreenedSource['line']> },
	{ lowest, highest }: ScreenWindow,
	promise: EachPromise
): Margins {
	const found = edgeRule(
		line,
		{
			...(lowest === undefined ? {} : { lowest }),
			...(highest === undefined ? {} : { highest })
		},
		promise
	);
	return {
		...margin('minimum', found.minimum, found.minimumFactor, found.minimumEdge),
		...margin('maximum', found.maximum, found.maximumFactor, found.maximumEdge)
	};
}

function margin(side: Side, limit?: number, factor?: number, edge?: number): Margins {
	return limit === undefined || factor === undefined || edge === undefined
		? {}
		: { [side]: { limit, factor, edge } };
}

/** The window in deviations of x. */
export function standardWindow(
	{ meanX, deviationX }: ScreenedSource,
	{ lowest = -Infinity, highest = Infinity }: ScreenWindow
) {
	return { lowest: (lowest - meanX) / deviationX, highest: (highest - meanX) / deviationX };
}

/** Share of devices that pass, from the normal shape of x. */
export function shareThatPasses(source: ScreenedSource, window: ScreenWindow): number {
	return screenYield(standardWindow(source, window));
}

/** The same for known parameters: quantiles of y among the devices that pass. */
export function truncatedMargins(
	source: ScreenedSource,
	window: ScreenWindow,
	content: number
): Required<Margins> {
	const screen = { correlation: source.correlation, ...standardWindow(source, window) };
	const at = (probability: number): Margin => {
		const quantile = screenedQuantile(probability, screen);
		return {
			limit: source.meanY + source.deviationY * quantile,
			factor: probability < 0.5 ? -quantile : quantile
		};
	};
	return { minimum: at(1 - content), maximum: at(content) };
}

/** The edge rule with known parameters: it holds for any distribution of x inside the window. */
export function knownEdgeLimits(
	source: ScreenedSource,
	window: ScreenWindow,
	content: number
): Readonly<Record<Side, number | null>> {
	const { lowest, highest } = standardWindow(source, window);
	const [low, high] = source.correlation >= 0 ? [lowest, highest] : [highest, lowest];
	const { correlation } = source;
	const inUnits = (y: number) => (Number.isFinite(y) ? source.meanY + source.deviationY * y : null);
	return {
		minimum: inUnits(-screenedEdge(-low, { correlation, content })),
		maximum: inUnits(screenedEdge(high, { correlation, content }))
	};
}

/** Limits of y when nothing is screened: k₁ of the sample, or the normal quantile. */
export function plainMargins(
	{ sampleSize, meanY, deviationY }: ScreenedSource,
	promise: EachPromise
): Required<Margins> {
	const factor =
		sampleSize === null
			? normalQuantile(promise.content)
			: oneSidedToleranceFactor(sampleSize, promise);
	return {
		minimum: { limit: meanY - factor * deviationY, factor },
		maximum: { limit: meanY + factor * deviationY, factor }
	};
}
