import { junctionMessages as say } from '../messages/junction';
import { dopingProfile, type ProfilePoint } from './dopingProfile';
import { JunctionDataError } from './errors';
import type { OrderedSweep } from './orderSweep';
import { reciprocalSquareLine, type ReciprocalSquareLine } from './reciprocalSquareLine';
import type { AnalysedLine } from './sweepAnalysis';
import type { SweepRequest } from './sweepRequest';

/** 25 °C in K: where a datasheet speaks of when it says nothing else. */
export const ROOM_TEMPERATURE = 298.15;

export interface AnalysedJunction {
	readonly line: AnalysedLine | null;
	readonly profile: readonly ProfilePoint[] | null;
	readonly warnings: readonly string[];
}

/**
 * Line and profile of a sweep, the case taken off, or a sentence that says why there are none.
 * Without a window the line uses the reverse biases: forward of zero the mobile charge bends it.
 */
export function analyseLine(
	{ biases, capacitances, distinct }: OrderedSweep,
	request: SweepRequest,
	caseCapacitance: number
): AnalysedJunction {
	const { area, relativePermittivity } = request;
	if (area === undefined || relativePermittivity === undefined) {
		const missing = [
			...(area === undefined ? ['area'] : []),
			...(relativePermittivity === undefined ? ['relativePermittivity'] : [])
		];
		return { line: null, profile: null, warnings: [say.missingForLine(missing)] };
	}
	const { junction = 'metal-semiconductor', temperature = ROOM_TEMPERATURE } = request;
	const states = request.effectiveDensityOfStates;
	const window = request.window ?? reverseBiases(biases);
	const found = readLine(biases, capacitances, {
		...{ area, relativePermittivity, temperature, junction, caseCapacitance, window },
		...(states === undefined ? {} : { effectiveDensityOfStates: states })
	});
	const profile = dopingProfile(
		distinct.biases,
		distinct.capacitances,
		{ area, relativePermittivity },
		caseCapacitance
	);
	const gaps = distinct.biases.length - 1 - profile.length;
	return {
		line: found === undefined ? null : lineOf(found, window),
		profile,
		warnings: [
			...(request.temperature === undefined ? [say.temperatureTaken(temperature)] : []),
			...(request.junction === undefined ? [say.junctionTaken()] : []),
			...(found === undefined ? [say.lineNotRising()] : lineWarnings(found, request, window)),
			...(gaps > 0 ? [say.profileGaps(gaps)] : [])
		]
	};
}

const reverseBiases = (biases: readonly number[]): readonly [number, number] => [
	Math.max(0, biases[0] ?? 0),
	biases.at(-1) ?? 0
];

/** The line, or `undefined` where the readings in the window don't make one. */
function readLine(
	...[biases, capacitances, settings]: Parameters<typeof reciprocalSquareLine>
): ReciprocalSquareLine | undefined {
	try {
		return reciprocalSquareLine(biases, capacitances, settings);
	} catch (problem) {
		if (problem instanceof JunctionDataError) return undefined;
		throw problem;
	}
}

function lineOf(found: ReciprocalSquareLine, window: readonly [number, number]): AnalysedLine {
	const { slope, intercept, voltageIntercept, builtInPotential, barrierHeight } = found;
	const { doping, r2, curvature, points } = found;
	return {
		...{ slope, intercept, donorConcentration: doping, voltageIntercept, builtInPotential },
		...{ barrierHeight, r2, curvature, window, points }
	};
}

function lineWarnings(
	found: ReciprocalSquareLine,
	{ junction, effectiveDensityOfStates: states }: SweepRequest,
	window: readonly [number, number]
): string[] {
	const isMetal = junction !== 'p-n';
	return [
		...(isMetal ? [] : [say.noBarrierOfPn()]),
		...(isMetal && states === undefined ? [say.noBarrierWithoutStates()] : []),
		...(isMetal && states !== undefined && found.doping > states ? [say.degenerate()] : []),
		...(found.builtInPotential > 0 ? [] : [say.noBuiltInPotential(found.builtInPotential)]),
		...(found.isCurved ? [say.lineBends(found.curvature, ...window)] : [])
	];
}
