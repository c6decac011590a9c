import type { Basis } from '../core/limits/basis';

/** A row of the capacitance table: bias in V, capacitances in the chart's unit. */
export interface CapacitancePoint {
	readonly bias: number;
	readonly minimum: number | null;
	readonly typical: number;
	readonly maximum: number | null;
	readonly basis: Basis | null;
}
