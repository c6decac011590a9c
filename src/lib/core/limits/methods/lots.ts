import { limitMessages } from '../../messages/limits';
import { lotsToleranceHalfWidth, lotsToleranceMargin } from '../../stats/lotsToleranceMargin';
import type { LotStrata } from '../../stats/lotStrata';
import { significant } from '../digits';
import { lotDesign, type LotDesign } from '../lotDesign';
import { contentWarning } from './contentWarning';
import type { Margin, MethodInput, MethodOutcome, NamedMoment } from './method';
import { totalDeviation } from './moments';
import { promiseOf, type SidePromise } from './promise';

/** Fewer lots can't show how much lots differ. */
export const FEWEST_LOTS = 3;

/**
 * Limits for the devices of future lots: mean of the lot means ∓ margin, the margin being the
 * γ-quantile of a generalized pivotal quantity of the model lot + (wafer +) device, found by
 * deterministic quadrature. One-way where each lot has one wafer, nested otherwise; unbalanced by
 * unweighted means with effective sizes; each limit on its own or the content between both.
 *
 * Sources: Krishnamoorthy and Mathew 2004, Technometrics 46; 2009, chapters 4 and 5; Liao, Lin and
 * Iyer 2005, Technometrics 47.
 */
export function lotsMethod({ distribution, rules, sides }: MethodInput): MethodOutcome {
	const { sampleSize, independentLots, origin, censoring, standardDeviation } = distribution;
	if (origin === 'entered') {
		return { status: 'refused', message: limitMessages.enteredHasNoLots() };
	}
	if (censoring !== undefined) {
		return { status: 'refused', message: limitMessages.lotsNeedNumbers() };
	}
	if (independentLots < FEWEST_LOTS) {
		return { status: 'refused', message: limitMessages.lotsNeedLots(FEWEST_LOTS, independentLots) };
	}
	const design = lotDesign(distribution);
	if (design === undefined) {
		return { status: 'refused', message: limitMessages.lotsNeedRepeats() };
	}
	const promise = promiseOf(rules, sides);
	const margin = marginOf(design.strata, promise);
	const limit: Margin = {
		kind: 'margin',
		centre: {
			value: design.strata.mean,
			name: 'Mean of lot means',
			method: `Each of ${design.strata.lots} wafer lots counts once, however many devices it gave.`
		},
		deviation: totalDeviation(distribution),
		components: deviations(design),
		factor: standardDeviation === 0 ? 0 : margin / standardDeviation,
		symbol: 'for future lots',
		method: `${promise.text} ${methodText(design, promise)}`
	};
	return {
		status: 'supported',
		limits: Object.fromEntries(sides.map((side) => [side, limit])),
		isPooled: false,
		warnings: contentWarning(rules.content, sampleSize)
	};
}

function marginOf(strata: LotStrata, { isBetween, content, confidence }: SidePromise): number {
	return isBetween
		? lotsToleranceHalfWidth(strata, { content, confidence })
		: lotsToleranceMargin(strata, { content, confidence });
}

function methodText({ isNested, isBalanced }: LotDesign, { isBetween }: SidePromise): string {
	const model = isNested ? 'Lots, wafers and devices' : 'Lots and devices';
	const sizes = isBalanced ? 'balanced' : 'of unequal sizes, by unweighted means';
	const source = isBetween ? 'Liao, Lin and Iyer 2005' : 'Krishnamoorthy and Mathew 2004 and 2009';
	return `${model} ${sizes}: generalized-variable margin by quadrature, in spreads: ${source}.`;
}

/** The variance estimates that the margin rests on, as deviations with their degrees of freedom. */
function deviations({ strata: { strata, lots }, isNested, sizes }: LotDesign): NamedMoment[] {
	const names = isNested
		? ['Spread of lot means', 'Spread of wafer means within lots', 'Spread within wafers']
		: ['Spread of lot means', 'Spread within lots'];
	return strata.map(({ variance, degrees, share }, level) => ({
		name: names[level] ?? 'Spread',
		method:
			level === 0
				? `${lots} lots of ${sizes}, ${degrees} degrees of freedom. It carries the spread inside a lot as far as lot means do.`
				: `${degrees} degrees of freedom; ${significant(share, 4)} of its square adds to that of lot means for a single device.`,
		value: Math.sqrt(variance)
	}));
}
