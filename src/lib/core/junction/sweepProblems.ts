import { junctionMessages as say } from '../messages/junction';
import type { RequestProblem } from '../requestProblems';
import { JUNCTION_POTENTIAL_BOUNDS, PARAMETERS } from './capacitanceFitResult';
import { orderSweep } from './orderSweep';
import type { SweepRequest } from './sweepRequest';

/** Fewest biases through which a line and its departure can be judged. */
const FEWEST_OF_LINE = 3;

/** What stands in the way of an analysis although every number is of its kind; empty when nothing. */
export function sweepProblems(request: SweepRequest): RequestProblem[] {
	const { biases, capacitances } = request;
	if (biases.length !== capacitances.length)
		return [
			{ path: 'capacitances', message: say.lengthsDiffer(biases.length, capacitances.length) }
		];
	const unusable = readingProblems(request);
	if (unusable.length > 0) return unusable;
	return [...rangeProblems(request), ...fixedProblems(request), ...windowProblems(request)];
}

function readingProblems({ biases, capacitances }: SweepRequest): RequestProblem[] {
	const largest = JUNCTION_POTENTIAL_BOUNDS[1];
	return [
		...capacitances.flatMap((value, i) =>
			value > 0 ? [] : [{ path: `capacitances[${i}]`, message: say.notPositive(value) }]
		),
		...biases.flatMap((bias, i) =>
			bias > -largest / 1.02
				? []
				: [{ path: `biases[${i}]`, message: say.forwardBeyond(bias, largest) }]
		)
	];
}

function rangeProblems({ biases, capacitances, fixed }: SweepRequest): RequestProblem[] {
	const { distinct } = orderSweep(biases, capacitances);
	const held = Object.values(fixed).filter((value) => value !== undefined).length;
	const required = Math.max(2, PARAMETERS.length - held);
	const actual = distinct.biases.length;
	if (actual < required) return [{ path: 'biases', message: say.fewBiases(required, actual) }];
	return distinct.capacitances[0]! > distinct.capacitances.at(-1)!
		? []
		: [{ path: 'biases', message: say.signTurned() }];
}

function fixedProblems({ biases, capacitances, fixed }: SweepRequest): RequestProblem[] {
	const { junctionPotential, caseCapacitance = 0 } = fixed;
	const deepest = biases.reduce((least, bias) => Math.min(least, bias), 0);
	const smallest = capacitances.reduce((least, value) => Math.min(least, value), Infinity);
	return [
		...(junctionPotential !== undefined && junctionPotential <= -deepest
			? [{ path: 'fixed.junctionPotential', message: say.potentialBelowForward(-deepest) }]
			: []),
		...(caseCapacitance >= smallest
			? [{ path: 'fixed.caseCapacitance', message: say.caseTooLarge(smallest) }]
			: [])
	];
}

function windowProblems({ biases, window }: SweepRequest): RequestProblem[] {
	if (window === undefined) return [];
	const [low, high] = window;
	if (!(low < high)) return [{ path: 'window', message: say.windowCrossed() }];
	const inside = new Set(biases.filter((bias) => bias >= low && bias <= high)).size;
	return inside >= FEWEST_OF_LINE
		? []
		: [{ path: 'window', message: say.windowTooNarrow(low, high, inside) }];
}
