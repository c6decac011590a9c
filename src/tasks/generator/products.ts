import type { DemoProduct } from './diode';

/** What a grid of biases must contain, filled up to 33 values that tables don't print. */
const TUNING_BIASES = [
	0, 0.25, 0.5, 0.75, 1, 1.5, 2, 2.5, 3, 3.5, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15, 16, 17, 18,
	19, 20, 22, 24, 25, 26, 28, 30
];
const RECTIFIER_BIASES = [
	0, 0.1, 0.2, 0.3, 0.5, 0.7, 1, 1.5, 2, 3, 4, 5, 6, 7, 8, 10, 12, 14, 15, 16, 18, 20, 22, 25, 28,
	30, 35, 40, 42, 45, 50, 55, 60
];

/** A hyperabrupt tuning diode: about 39 pF at 0 V, 2 pF at 28 V. */
export const TUNING_DIODE: DemoProduct = {
	partNumber: 'LKT-1130',
	seed: 1130,
	law: {
		caseCapacitance: 0.12,
		zeroBiasCapacitance: 39,
		junctionPotential: 2.5,
		gradingExponent: 1.22
	},
	lotSpread: { zeroBiasCapacitance: 0.01, junctionPotential: 0.006, gradingExponent: 0.003 },
	waferSpread: { zeroBiasCapacitance: 0.006, junctionPotential: 0.004, gradingExponent: 0.002 },
	deviceSpread: { zeroBiasCapacitance: 0.015, junctionPotential: 0.008, gradingExponent: 0.003 },
	potentialDrift: 0.0015,
	noise: 0.0008,
	resolution: 0.001,
	lots: [
		'LK24-031',
		'LK24-036',
		'LK24-040',
		'LK24-044',
		'LK24-047',
		'LK24-052',
		'LK24-055',
		'LK24-061'
	],
	wafers: ['03', '07', '12', '19'],
	devicesPerWafer: 25,
	biases: TUNING_BIASES,
	temperatures: [-40, 25, 85],
	frequency: 1e6,
	decimals: 3,
	faults: [
		{ kind: 'lostContact', lot: 'LK24-031', wafer: '07', device: 11, temperature: 25 },
		{ kind: 'lostContact', lot: 'LK24-036', wafer: '19', device: 4, temperature: 85 },
		{ kind: 'jump', lot: 'LK24-036', wafer: '03', device: 17, temperature: 25, bias: 8 },
		{ kind: 'jump', lot: 'LK24-040', wafer: '12', device: 22, temperature: -40, bias: 15 }
	]
};

/** A Schottky rectifier, uniformly doped: about 300 pF at 0 V, measured to 60 V. */
export const SCHOTTKY_RECTIFIER: DemoProduct = {
	partNumber: 'LKR-2406',
	seed: 2406,
	law: {
		caseCapacitance: 1.5,
		zeroBiasCapacitance: 300,
		junctionPotential: 0.62,
		gradingExponent: 0.45
	},
	lotSpread: { zeroBiasCapacitance: 0.012, junctionPotential: 0.006, gradingExponent: 0.003 },
	waferSpread: { zeroBiasCapacitance: 0.007, junctionPotential: 0.004, gradingExponent: 0.002 },
	deviceSpread: { zeroBiasCapacitance: 0.014, junctionPotential: 0.006, gradingExponent: 0.002 },
	potentialDrift: 0.001,
	noise: 0.006,
	resolution: 0.01,
	lots: [
		'LR25-002',
		'LR25-007',
		'LR25-011',
		'LR25-016',
		'LR25-018',
		'LR25-023',
		'LR25-027',
		'LR25-030'
	],
	wafers: ['02', '08', '15', '21'],
	devicesPerWafer: 25,
	biases: RECTIFIER_BIASES,
	temperatures: [25],
	frequency: 1e6,
	decimals: 2,
	faults: [
		{ kind: 'lostContact', lot: 'LR25-007', wafer: '08', device: 9, temperature: 25 },
		{ kind: 'jump', lot: 'LR25-011', wafer: '15', device: 20, temperature: 25, bias: 20 }
	]
};

export const DEMO_PRODUCTS: readonly DemoProduct[] = [TUNING_DIODE, SCHOTTKY_RECTIFIER];
