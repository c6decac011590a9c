import { screenedMessages as say } from '../../messages/screened';
import type { RequestProblem } from '../../requestProblems';
import type { Side } from '../allowance';
import { screenedAnswer, type FoundMargins, type ScreenedAnswer } from './screenedAnswer';
import {
	edgeMargins,
	plainMargins,
	shareThatPasses,
	truncatedMargins,
	type EachPromise
} from './screenedMargins';
import type { ScreenedRequest } from './screenedRequest';
import { screenedSource, type ScreenedSource } from './screenedSource';
import { screenWindow, type ScreenWindow } from './screenWindow';

export type ScreenedOutcome =
	| { readonly status: 'answered'; readonly answer: ScreenedAnswer }
	| { readonly status: 'refused'; readonly problems: readonly RequestProblem[] };

/** Less than this passes no real window. */
const NOTHING_PASSES = 1e-9;

const refused = (...problems: RequestProblem[]): ScreenedOutcome => ({
	status: 'refused',
	problems
});

/**
 * Limits at one condition from a test at another:
 *
 * request → devices or moments → window → margins of the transformed quantity → conditions → answer
 *
 * From devices (or moments with their n) by the edge rule: the tolerance bound of the regression,
 * taken at the test limit itself, which holds whatever devices pass. From known parameters by the
 * normal pair cut off at the window. A ratio without a window isn't screened at all.
 *
 * Source: Krishnamoorthy and Mathew 2009, section 3.2; Johnson, Kotz and Balakrishnan 1994, 13.10.
 */
export function screenedLimits(request: ScreenedRequest): ScreenedOutcome {
	const read = screenedSource(request);
	if (read.status === 'refused') return read;
	const looked = screenWindow(request);
	if (looked.status === 'refused') return looked;
	const { source } = read;
	const { window } = looked;
	const { confidence } = request;
	if (source.sampleSize !== null && confidence === undefined)
		return refused({ path: 'confidence', message: say.confidenceMissing() });
	const sides = sidesOf(request);
	const each = eachConfidence(confidence, sides);
	const found = marginsOf(source, window, { content: request.content, confidence: each });
	if (found.status === 'refused') return found;
	const missing = sides.flatMap((side) =>
		found.margins[side] === undefined ? [missingEdge(side, source)] : []
	);
	if (missing.length > 0) return refused(...missing);
	return { status: 'answered', answer: screenedAnswer(request, { source, window, sides, found }) };
}

const sidesOf = ({ sides }: ScreenedRequest): readonly Side[] =>
	sides === 'minimum-and-maximum' ? ['minimum', 'maximum'] : [sides];

/** Two limits that are promised at once share the doubt; known parameters have none. */
function eachConfidence(confidence: number | undefined, sides: readonly Side[]): number {
	if (confidence === undefined) return NaN;
	return sides.length === 2 ? (1 + confidence) / 2 : confidence;
}

function marginsOf(
	source: ScreenedSource,
	window: ScreenWindow | null,
	promise: EachPromise
): ({ readonly status: 'found' } & FoundMargins) | Extract<ScreenedOutcome, { status: 'refused' }> {
	const { line } = source;
	if (window === null)
		return {
			status: 'found',
			method: 'unscreened',
			margins: plainMargins(source, promise),
			promise
		};
	if (line !== null) {
		const margins = edgeMargins({ ...source, line }, window, promise);
		return { status: 'found', method: 'edge-rule', margins, promise };
	}
	if (shareThatPasses(source, window) < NOTHING_PASSES)
		return { status: 'refused', problems: [{ path: 'window', message: say.nothingPasses() }] };
	const margins = truncatedMargins(source, window, promise.content);
	return { status: 'found', method: 'truncated-normal', margins, promise };
}

function missingEdge(side: Side, { correlation }: ScreenedSource): RequestProblem {
	const rises = correlation >= 0;
	const edge = (side === 'maximum') === rises ? 'high' : 'low';
	return { path: `window.${edge}`, message: say.edgeMissing(side, edge, rises) };
}
