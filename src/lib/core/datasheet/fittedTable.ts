import { modelCapacitance, type CapacitanceModel } from '../junction/capacitanceModel';
import { fitCapacitance } from '../junction/fitCapacitance';
import type { DocumentSection } from './document';

export type TableSection = Extract<DocumentSection, { kind: 'capacitance-table' }>;

export interface TypicalPoint {
	/** In V. */
	readonly bias: number;
	/** In F, of the printed digits. */
	readonly capacitance: number;
}

/** The rows of a table that print a typical value at zero or reverse bias. */
export function typicalPoints({ rows }: TableSection): TypicalPoint[] {
	return rows.flatMap(({ bias, typical }) =>
		typical === null || typical.value <= 0 || bias.value < 0
			? []
			: [{ bias: bias.value, capacitance: typical.value }]
	);
}

export interface FittedTable {
	readonly model: CapacitanceModel;
	/** The largest relative deviation from a printed typical value: 0.01 is 1 %. */
	readonly worst: number;
	readonly pointCount: number;
}

/** A law has four parameters; fewer points than this would be met by anything. */
const FEWEST_POINTS = 6;
/** A law that misses a printed value by more than this is not what the table shows. */
const LARGEST_DEVIATION = 0.05;

/**
 * The power law through the typical values of a table, or `null` where there are too few of them or
 * one law does not describe them.
 */
export function fittedTable(table: TableSection): FittedTable | null {
	const points = typicalPoints(table);
	if (points.length < FEWEST_POINTS) return null;
	const { model, converged } = fitCapacitance(
		points.map(({ bias }) => bias),
		points.map(({ capacitance }) => capacitance)
	);
	const rounded = roundedModel(model);
	const worst = Math.max(
		...points.map(({ bias, capacitance }) =>
			Math.abs(modelCapacitance(rounded, bias) / capacitance - 1)
		)
	);
	return converged && worst <= LARGEST_DEVIATION
		? { model: rounded, worst, pointCount: points.length }
		: null;
}

/** Four significant digits: what is printed is what the curves and the model file use. */
function roundedModel(model: CapacitanceModel): CapacitanceModel {
	const four = (value: number) => Number(value.toPrecision(4));
	return {
		zeroBiasCapacitance: four(model.zeroBiasCapacitance),
		junctionPotential: four(model.junctionPotential),
		gradingExponent: four(model.gradingExponent),
		caseCapacitance: four(model.caseCapacitance)
	};
}
