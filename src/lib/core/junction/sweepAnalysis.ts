import type { ParameterName } from './capacitanceFitResult';
import type { CapacitanceModel } from './capacitanceModel';
import type { StoredCharge } from './chargeAndEnergy';
import type { ProfilePoint } from './dopingProfile';

/** The fitted law, flat, with how far it can be believed; see `CapacitanceFit`. */
export interface AnalysedModel extends CapacitanceModel {
	readonly standardErrors: Readonly<Record<ParameterName, number | null>>;
	readonly residualRms: number;
	readonly boundsHit: readonly ParameterName[];
	readonly converged: boolean;
	readonly identifiable: boolean;
}

/** The 1/C² line of a sweep, in SI units. */
export interface AnalysedLine {
	/** d(1/C²)/dV_R in 1/(F²V), and 1/C² at zero bias in 1/F². */
	readonly slope: number;
	readonly intercept: number;
	/** Net doping of the lightly doped side in m⁻³: of acceptors when that is p-type. */
	readonly donorConcentration: number;
	/** V_i, where the line meets 1/C² = 0, and V_bi, both in V. */
	readonly voltageIntercept: number;
	readonly builtInPotential: number;
	/** φ_B in V, of a metal on a semiconductor. */
	readonly barrierHeight: number | null;
	readonly r2: number;
	/** Largest departure from the line as a share of the span of 1/C². */
	readonly curvature: number;
	/** Biases used, in V, and how many readings are between them. */
	readonly window: readonly [number, number];
	readonly points: number;
}

/** Everything that one sweep says of its junction. */
export interface SweepAnalysis {
	readonly model: AnalysedModel;
	readonly line: AnalysedLine | null;
	readonly profile: readonly ProfilePoint[] | null;
	/** Empty where no reading stands at 0 V. */
	readonly charge: readonly StoredCharge[];
	/** Text of a SPICE model file. */
	readonly spice: string;
	readonly warnings: readonly string[];
}
