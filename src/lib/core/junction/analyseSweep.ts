import { junctionMessages as say } from '../messages/junction';
import type { RequestProblem } from '../requestProblems';
import { analyseLine, ROOM_TEMPERATURE } from './analyseLine';
import type { FixedParameters } from './capacitanceFitResult';
import type { CapacitanceModel } from './capacitanceModel';
import { chargeAndEnergy, type StoredCharge } from './chargeAndEnergy';
import { fitCapacitance, type CapacitanceFit } from './fitCapacitance';
import { modelWarnings } from './modelWarnings';
import { orderSweep, type OrderedSweep } from './orderSweep';
import { spiceModel } from './spiceModel';
import type { SweepAnalysis } from './sweepAnalysis';
import { sweepProblems } from './sweepProblems';
import type { SweepRequest } from './sweepRequest';

export type SweepOutcome =
	| { readonly status: 'analysed'; readonly analysis: SweepAnalysis }
	| { readonly status: 'refused'; readonly problems: readonly RequestProblem[] };

/** The name of the subcircuit; a file that is kept renames it. */
const SPICE_NAME = 'fitted_junction';
const ZERO_CELSIUS = 273.15;

/**
 * Everything that one C–V sweep says of its junction:
 *
 * request → what stands in the way → order → fit → 1/C² line and profile → charge → SPICE text
 *
 * Neither the order of the readings nor their direction matters. What can't be had without a fact
 * that wasn't sent is `null`, and a warning says which fact.
 */
export function analyseSweep(request: SweepRequest): SweepOutcome {
	const problems = sweepProblems(request);
	if (problems.length > 0) return { status: 'refused', problems };
	const sweep = orderSweep(request.biases, request.capacitances);
	const held = heldParameters(request.fixed);
	const fit = fitCapacitance(sweep.biases, sweep.capacitances, held);
	const junction = analyseLine(sweep, request, fit.model.caseCapacitance);
	const charge = storedCharge(sweep, fit.model);
	return {
		status: 'analysed',
		analysis: {
			model: modelOf(fit),
			line: junction.line,
			profile: junction.profile,
			charge,
			spice: spiceText(sweep, fit, request),
			warnings: [
				...modelWarnings(fit, sweep, Object.keys(held).length),
				...junction.warnings,
				...(charge.length === 0 ? [say.noChargeWithoutZero()] : [])
			]
		}
	};
}

/** The parameters that were given; a key that was sent without a value is none. */
function heldParameters(fixed: SweepRequest['fixed']): FixedParameters {
	const { gradingExponent, caseCapacitance, junctionPotential } = fixed;
	return {
		...(gradingExponent === undefined ? {} : { gradingExponent }),
		...(caseCapacitance === undefined ? {} : { caseCapacitance }),
		...(junctionPotential === undefined ? {} : { junctionPotential })
	};
}

function modelOf({ model, ...judgement }: CapacitanceFit): SweepAnalysis['model'] {
	return { ...model, ...judgement };
}

function storedCharge({ distinct }: OrderedSweep, model: CapacitanceModel): StoredCharge[] {
	if (!distinct.biases.includes(0)) return [];
	return chargeAndEnergy(distinct.biases, distinct.capacitances, model);
}

function spiceText(
	{ biases }: OrderedSweep,
	{ model, residualRms }: CapacitanceFit,
	{ temperature = ROOM_TEMPERATURE }: SweepRequest
): string {
	const percent = residualRms * 100;
	const residual = percent < 0.001 ? 'below 0.001' : String(Number(percent.toPrecision(2)));
	return spiceModel({
		name: SPICE_NAME,
		capacitance: model,
		nominalCelsius: temperature - ZERO_CELSIUS,
		notes: [
			`${biases.length} readings from ${biases[0]} V to ${biases.at(-1)} V reverse bias, residual ${residual} percent rms`,
			'current, breakdown and transit time are defaults of the model, not measured'
		]
	});
}
