import { junctionMessages as say } from '../messages/junction';
import { PARAMETERS, type ParameterName } from './capacitanceFitResult';
import type { CapacitanceFit } from './fitCapacitance';
import type { OrderedSweep } from './orderSweep';
import { residualPattern } from './residualPattern';

/** A pattern this small is of no consequence for a datasheet; our choice. */
const PATTERN_MATTERS = 0.005;

/** Noise as large as this is said whatever its shape; our choice. */
const LARGE_RESIDUALS = 0.02;

/** A standard error above this share of its parameter leaves little of it; our choice. */
const POORLY_KNOWN = 0.3;
const JUDGED = ['junctionPotential', 'gradingExponent'] as const satisfies ParameterName[];

/** What a person must know before believing a fit. */
export function modelWarnings(
	fit: CapacitanceFit,
	{ biases, capacitances }: OrderedSweep,
	heldParameters: number
): string[] {
	const { model, standardErrors, boundsHit } = fit;
	const free = PARAMETERS.length - heldParameters;
	return [
		...(fit.converged ? [] : [say.notConverged()]),
		...(fit.identifiable ? [] : [say.notIdentifiable()]),
		...boundsHit.map((name) => say.boundHit(name, model[name])),
		...(biases.length <= free ? [say.noSpareReadings(free)] : []),
		...JUDGED.flatMap((name) => {
			const share = (standardErrors[name] ?? 0) / model[name];
			return fit.identifiable && share > POORLY_KNOWN ? [say.poorlyKnown(name, share)] : [];
		}),
		...residualWarnings(fit, biases, capacitances)
	];
}

function residualWarnings(
	{ model, residualRms }: CapacitanceFit,
	biases: readonly number[],
	capacitances: readonly number[]
): string[] {
	const { largest, at, isPattern } = residualPattern(biases, capacitances, model);
	if (isPattern && residualRms > PATTERN_MATTERS) return [say.notOneLaw(residualRms, largest, at)];
	return residualRms > LARGE_RESIDUALS ? [say.largeResiduals(residualRms, largest, at)] : [];
}
