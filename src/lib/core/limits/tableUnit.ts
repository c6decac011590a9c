/** A unit of capacitance a table can be in, and its size in farad. */
export interface TableUnit {
	readonly unit: string;
	readonly unitScale: number;
}

const CAPACITANCE_UNITS: readonly TableUnit[] = [
	{ unit: 'µF', unitScale: 1e-6 },
	{ unit: 'nF', unitScale: 1e-9 }
];
const PICOFARAD: TableUnit = { unit: 'pF', unitScale: 1e-12 };

/**
 * One unit for a whole table: pF, unless the typical values lie around or above 1000 pF, taken at
 * the geometric middle between the smallest and the largest of them.
 */
export function capacitanceUnit(typicals: readonly number[]): TableUnit {
	if (typicals.length === 0) return PICOFARAD;
	const middle = Math.sqrt(Math.min(...typicals)) * Math.sqrt(Math.max(...typicals));
	return CAPACITANCE_UNITS.find(({ unitScale }) => middle >= unitScale) ?? PICOFARAD;
}
