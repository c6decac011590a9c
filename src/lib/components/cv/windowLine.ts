import { JunctionDataError } from '$lib/core/junction/errors';
import {
	reciprocalSquareLine,
	type LineSettings,
	type ReciprocalSquareLine
} from '$lib/core/junction/reciprocalSquareLine';

/** A sweep of medians, ascending: V and F. */
export interface NamedSweep {
	readonly name: string;
	readonly biases: readonly number[];
	readonly capacitances: readonly number[];
}

/** What the page knows of the junction below a curve. */
export interface JunctionData {
	readonly median: NamedSweep;
	/** Empty until the sweeps are fitted. */
	readonly lots: readonly NamedSweep[];
	/** Of the median device in F: taken off every reading. */
	readonly caseCapacitance: number;
	readonly settings: Omit<LineSettings, 'window' | 'caseCapacitance'>;
}

/** The 1/C² line of a sweep inside a window; `undefined` where the readings there make none. */
export function windowLine(
	{ biases, capacitances }: NamedSweep,
	{ caseCapacitance, settings }: JunctionData,
	window: readonly [number, number]
): ReciprocalSquareLine | undefined {
	try {
		return reciprocalSquareLine(biases, capacitances, { ...settings, caseCapacitance, window });
	} catch (problem) {
		if (problem instanceof JunctionDataError) return undefined;
		throw problem;
	}
}

/** 1/C² of a sweep in 1/F², the case taken off; readings that the case uses up are left out. */
export function reciprocalSquares(
	{ name, biases, capacitances }: NamedSweep,
	caseCapacitance: number
) {
	return {
		name,
		points: biases.flatMap((bias, i) => {
			const junction = (capacitances[i] ?? Number.NaN) - caseCapacitance;
			return junction > 0 ? [{ bias, inverseSquare: 1 / junction ** 2 }] : [];
		})
	};
}
