/** Elementary charge in C; exact since the SI of 2019. */
export const ELEMENTARY_CHARGE = 1.602176634e-19;

/** Boltzmann constant in J/K; exact since the SI of 2019. */
export const BOLTZMANN = 1.380649e-23;

/** Permittivity of vacuum in F/m; CODATA 2022. */
export const VACUUM_PERMITTIVITY = 8.8541878188e-12;

/** Boltzmann constant in eV/K, that is k/q in V/K. */
export const BOLTZMANN_IN_VOLTS = BOLTZMANN / ELEMENTARY_CHARGE;

/** kT/q in V at a temperature in K. */
export function thermalVoltage(temperature: number): number {
	return BOLTZMANN_IN_VOLTS * temperature;
}
