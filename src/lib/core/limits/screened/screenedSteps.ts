import { screenedMessages as say } from '../../messages/screened';
import { heightVariance } from '../../stats/regressionTolerance';
import type { Side } from '../allowance';
import { significant } from '../digits';
import type { DerivationStep } from '../limit';
import type { EachPromise, Margin, ScreenedMethod } from './screenedMargins';
import type { ScreenedRequest } from './screenedRequest';
import type { ScreenedSource } from './screenedSource';
import type { ScreenWindow } from './screenWindow';

/** Digits with which a reader can redo the sum. */
const FIGURES = 8;

const step = (name: string, method: string, value: number): DerivationStep => ({
	name,
	method,
	value,
	unit: '',
	text: significant(value, FIGURES)
});

/** What the limits of both sides have in common: from devices to line and window. */
export function sourceSteps(
	{ transform, quantity, tested }: ScreenedRequest,
	source: ScreenedSource,
	window: ScreenWindow | null
): DerivationStep[] {
	const { line, sampleSize, meanX, meanY, deviationX, deviationY, correlation } = source;
	const moments =
		quantity === 'ratio'
			? say.ratioMoments()
			: tested === undefined
				? say.momentsOf(transform)
				: say.line(sampleSize ?? 0);
	return [
		step('Mean, tested', moments, meanX),
		step('Deviation, tested', moments, deviationX),
		step('Mean, limited', moments, meanY),
		step('Deviation, limited', moments, deviationY),
		step('Correlation', moments, correlation),
		...(line === null || window === null
			? []
			: [
					step('Intercept', say.line(line.sampleSize), line.intercept),
					step('Slope', say.line(line.sampleSize), line.slope),
					step('Residual deviation', say.residual(), line.residualDeviation)
				]),
		...(window?.lowest === undefined
			? []
			: [step('Lower edge', say.widened('low'), window.lowest)]),
		...(window?.highest === undefined
			? []
			: [step('Upper edge', say.widened('high'), window.highest)])
	];
}

interface SideSteps {
	readonly side: Side;
	readonly margin: Margin;
	readonly raw: number;
	readonly method: ScreenedMethod;
	readonly promise: EachPromise;
	readonly transform: ScreenedRequest['transform'];
	readonly source: ScreenedSource;
}

/** From the factor to the raw limit of one side. */
export function sideSteps(of: SideSteps): DerivationStep[] {
	const { side, margin, raw, transform } = of;
	return [
		...factorSteps(of),
		step(`Transformed ${side}`, limitMethod(of), margin.limit),
		step(`Raw ${side}`, say.backTransformed(transform), raw)
	];
}

function factorSteps({ side, margin, method, promise, source }: SideSteps): DerivationStep[] {
	const name = `Factor, ${side}`;
	const { content, confidence } = promise;
	switch (method) {
		case 'edge-rule':
			return [
				...(source.line === null || margin.edge === undefined
					? []
					: [step(`d², ${side}`, say.height(), heightVariance(source.line, margin.edge))]),
				step(name, say.edgeFactor(content, confidence), margin.factor)
			];
		case 'truncated-normal':
			return [step(name, say.truncatedFactor(content), margin.factor)];
		case 'unscreened': {
			const asked = source.sampleSize === null ? undefined : confidence;
			return [step(name, say.plainFactor(content, asked), margin.factor)];
		}
		default:
			return method satisfies never;
	}
}

function limitMethod({ side, method, source }: SideSteps): string {
	if (method !== 'edge-rule') return say.meanLimit(side);
	const rises = source.correlation >= 0;
	return say.edgeLimit(side, (side === 'maximum') === rises ? 'high' : 'low');
}
