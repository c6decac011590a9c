/** The law a simulated diode follows: C = C_case + C_j0·(1 + V/V_j)^−M. */
export interface DiodeLaw {
	/** In pF. */
	readonly caseCapacitance: number;
	readonly zeroBiasCapacitance: number;
	/** In V. */
	readonly junctionPotential: number;
	readonly gradingExponent: number;
}

/** Standard deviations of one level: relative, of C_j0, V_j and M. */
export interface Spread {
	readonly zeroBiasCapacitance: number;
	readonly junctionPotential: number;
	readonly gradingExponent: number;
}

/** A product that the demo measures. */
export interface DemoProduct {
	readonly partNumber: string;
	readonly seed: number;
	/** At 25 °C. */
	readonly law: DiodeLaw;
	readonly lotSpread: Spread;
	readonly waferSpread: Spread;
	readonly deviceSpread: Spread;
	/** Fall of the junction potential, in V per kelvin. */
	readonly potentialDrift: number;
	/** Standard deviation of one reading, in pF, and one step of the instrument. */
	readonly noise: number;
	readonly resolution: number;
	readonly lots: readonly string[];
	readonly wafers: readonly string[];
	readonly devicesPerWafer: number;
	/** In V, reverse positive. */
	readonly biases: readonly number[];
	readonly temperatures: readonly number[];
	/** In Hz. */
	readonly frequency: number;
	/** Decimals the instrument prints. */
	readonly decimals: number;
	readonly faults: readonly Fault[];
}

/** Something that went wrong while measuring. */
export interface Fault {
	readonly kind: 'lostContact' | 'jump';
	readonly lot: string;
	readonly wafer: string;
	/** Counted from 1 on the wafer. */
	readonly device: number;
	readonly temperature: number;
	/** The bias of a jump, in V. */
	readonly bias?: number;
}

/** Capacitance of a law at a reverse bias, in pF. */
export function capacitance(law: DiodeLaw, bias: number): number {
	return (
		law.caseCapacitance +
		law.zeroBiasCapacitance * (1 + bias / law.junctionPotential) ** -law.gradingExponent
	);
}

/**
 * The law at another temperature. The junction potential falls as a junction warms; since
 * C_j0 ∝ V_j^−M for the same doping, capacitance rises with it.
 */
export function atTemperature(law: DiodeLaw, celsius: number, drift: number): DiodeLaw {
	const potential = law.junctionPotential - drift * (celsius - 25);
	const ratio = law.junctionPotential / potential;
	return {
		...law,
		junctionPotential: potential,
		zeroBiasCapacitance: law.zeroBiasCapacitance * ratio ** law.gradingExponent
	};
}
