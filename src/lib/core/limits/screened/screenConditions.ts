import { screenedMessages as say } from '../../messages/screened';
import { andersonDarling } from '../../stats/andersonDarling';
import { pValue, significant } from '../digits';
import { LOTS_DIFFER_BELOW } from '../lotTest';
import {
	bendCheck,
	lotEffect,
	residualsOf,
	spreadCheck,
	type LineCheck,
	type LotEffect
} from './lineChecks';
import type { Margin } from './screenedMargins';
import type { Pairs, ScreenedSource } from './screenedSource';
import type { ScreenWindow } from './screenWindow';

/** A condition on which screened limits rest. */
export interface ScreenCondition {
	readonly name: ConditionName;
	readonly verdict: 'holds' | 'fails' | 'not-checked';
	/** What was checked and what came out. */
	readonly statement: string;
	readonly p?: number;
}

/** How the conditions are called in sentences. */
export const CONDITION_NAMES = {
	linear: 'straight line',
	'even-spread': 'even spread',
	normal: 'normal residuals',
	'inside-range': 'test limits inside the characterized range',
	lots: 'lots alike on the residuals',
	'tester-uncertainty': 'window widened by the uncertainty of the tester',
	edges: 'edges by the slope'
} as const;
export type ConditionName = keyof typeof CONDITION_NAMES;

/**
 * Three checks of shape are made at once on every request; at five in a hundred each, one request of
 * seven would be refused by chance. Our choice.
 */
const SHAPE_FAILS_BELOW = 0.01;

/** Below this the checks of shape see nothing. */
const FEWEST = 8;

/** What the checks look at. */
interface Checked {
	readonly source: ScreenedSource;
	/** `null` where nothing is screened. */
	readonly window: ScreenWindow | null;
	readonly margins: readonly Margin[];
	/** A transformed value as it was sent. */
	readonly shown: (transformed: number) => string;
}

/** Every condition with its verdict, those of the line only where there is a screen. */
export function screenConditions(checked: Checked): ScreenCondition[] {
	const { source, window } = checked;
	return [
		...shapeConditions(source, window !== null),
		lotCondition(source.pairs, window !== null),
		...(window === null
			? []
			: [rangeCondition(checked, window), uncertaintyCondition(window), edgeCondition(source)])
	];
}

function shapeConditions({ pairs, line }: ScreenedSource, isScreened: boolean): ScreenCondition[] {
	const names = isScreened ? (['linear', 'even-spread', 'normal'] as const) : (['normal'] as const);
	const unchecked = (statement: string) => names.map((name) => notChecked(name, statement));
	if (pairs === undefined || line === null) return unchecked(say.summaryOnly());
	if (pairs.x.length < FEWEST) return unchecked(say.tooFewToTell(FEWEST));
	const residuals = isScreened ? residualsOf(line, pairs.x, pairs.y) : [...pairs.y];
	if (isFlat(residuals)) return unchecked(say.noResiduals());
	const { adjusted, pValue: p } = andersonDarling(residuals);
	const normal = judge('normal', { statistic: adjusted, p }, say.normal);
	if (!isScreened) return [normal];
	const bend = bendCheck(pairs.x, residuals);
	return [
		bend === undefined
			? notChecked('linear', say.tooFewToTell(FEWEST))
			: judge('linear', bend, say.linear),
		judge('even-spread', spreadCheck(pairs.x, residuals), say.even),
		normal
	];
}

/** Whether all that is left over is rounding of the arithmetic. */
function isFlat(residuals: readonly number[]): boolean {
	return residuals.every((residual) => Math.abs(residual) < 1e-12);
}

function judge(
	name: ConditionName,
	{ statistic, p }: LineCheck,
	sentence: (statistic: string, p: string) => string
): ScreenCondition {
	return {
		name,
		verdict: p < SHAPE_FAILS_BELOW ? 'fails' : 'holds',
		statement: sentence(significant(statistic, 4), pValue(p)),
		p
	};
}

const notChecked = (name: ConditionName, statement: string): ScreenCondition => ({
	name,
	verdict: 'not-checked',
	statement
});

function lotCondition(pairs: Pairs | undefined, isScreened: boolean): ScreenCondition {
	if (pairs?.groups === undefined) return notChecked('lots', say.noLotsSent());
	const effect = lotEffect(isScreened ? pairs.x : undefined, pairs.y, pairs.groups);
	if (effect === undefined) return notChecked('lots', say.oneLot());
	const { p } = effect;
	const differ = p < LOTS_DIFFER_BELOW;
	return {
		name: 'lots',
		verdict: differ ? 'fails' : 'holds',
		statement: (differ ? say.lotsDiffer : say.lotsAlike)(fText(effect), pValue(p)),
		p
	};
}

const fText = ({ statistic, degrees: [between, within] }: LotEffect) =>
	`F(${between}, ${within}) = ${significant(statistic, 4)}`;

function rangeCondition(
	{ source, margins, shown }: Checked,
	{ lowest, highest }: ScreenWindow
): ScreenCondition {
	if (source.range === undefined) return notChecked('inside-range', say.rangeNotSent());
	const [from, to] = source.range;
	const edges = margins.flatMap(({ edge }) => (edge === undefined ? [] : [edge]));
	const sent = [lowest, highest].filter((edge) => edge !== undefined);
	const isInside = (edges.length > 0 ? edges : sent).every((x) => x >= from && x <= to);
	return {
		name: 'inside-range',
		verdict: isInside ? 'holds' : 'fails',
		statement: say.inside(shown(from), shown(to))
	};
}

function uncertaintyCondition({ low, high, isWidened }: ScreenWindow): ScreenCondition {
	if (!isWidened) return notChecked('tester-uncertainty', say.notWidened());
	const text = (value: number | undefined) => (value === undefined ? '∞' : significant(value, 6));
	return {
		name: 'tester-uncertainty',
		verdict: 'holds',
		statement: say.widenedBy(low === undefined ? '−∞' : text(low), text(high))
	};
}

function edgeCondition({ correlation }: ScreenedSource): ScreenCondition {
	const statement = correlation < 0 ? say.falls() : say.rises();
	return { name: 'edges', verdict: 'holds', statement };
}
