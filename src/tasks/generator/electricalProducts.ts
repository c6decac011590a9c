import type { ElectricalLaw, ElectricalSpread } from './electrical';
import { SCHOTTKY_RECTIFIER, TUNING_DIODE } from './products';

/** One reading that every device gets. */
export interface ReadingPlan {
	readonly characteristic: 'V_F' | 'I_R' | 'V_(BR)' | 'r_s' | 'R_th(j-mb)';
	/** In °C. */
	readonly temperature: number;
	/** In MHz. */
	readonly frequency?: number;
	/** In V. */
	readonly reverseVoltage?: number;
	/** In A. */
	readonly forwardCurrent?: number;
	/** In mA. */
	readonly reverseCurrent?: number;
	/** As the tester prints it, and one of it in SI. */
	readonly unit: string;
	readonly unitSize: number;
	readonly decimals: number;
	/** Relative standard deviation of one reading. */
	readonly noise: number;
	/** The least and the most the tester can tell, in its unit. */
	readonly floor?: number;
	readonly ceiling?: number;
	/** Fewer devices than all, for what takes long to measure. */
	readonly devicesPerWafer?: number;
}

/** How a product of the demo conducts, and what is read of it. */
export interface ElectricalProduct {
	readonly partNumber: string;
	readonly seed: number;
	readonly lots: readonly string[];
	readonly wafers: readonly string[];
	readonly devicesPerWafer: number;
	readonly law: ElectricalLaw;
	readonly lotSpread: ElectricalSpread;
	readonly waferSpread: ElectricalSpread;
	readonly deviceSpread: ElectricalSpread;
	readonly readings: readonly ReadingPlan[];
	/** Readings of one characteristic to which something is added, in SI. */
	readonly faults: readonly {
		readonly lot: string;
		readonly wafer: string;
		readonly device: number;
		readonly characteristic: ReadingPlan['characteristic'];
		readonly added: number;
	}[];
	/** Sweeps of the current along these biases, in V with reverse negative; none without them. */
	readonly sweeps?: {
		readonly temperatures: readonly number[];
		readonly biases: readonly number[];
		readonly devicesPerWafer: number;
	};
}

const partOf = (spread: ElectricalSpread, share: number): ElectricalSpread => ({
	saturation: spread.saturation * share,
	leakage: spread.leakage * share,
	breakdown: spread.breakdown * share,
	resistance: spread.resistance * share,
	thermal: spread.thermal * share
});

const TUNING_SPREAD: ElectricalSpread = {
	saturation: 0.12,
	leakage: 0.7,
	breakdown: 0.9,
	resistance: 0.045,
	thermal: 0.04
};
const RECTIFIER_SPREAD: ElectricalSpread = {
	saturation: 0.2,
	leakage: 0.25,
	breakdown: 1.1,
	resistance: 0.03,
	thermal: 0.035
};

/** The tuning diode: a fraction of a nanoampere in reverse, which not every reading can tell. */
const TUNING_READINGS: ElectricalProduct = {
	partNumber: TUNING_DIODE.partNumber,
	seed: TUNING_DIODE.seed,
	lots: TUNING_DIODE.lots,
	wafers: TUNING_DIODE.wafers,
	devicesPerWafer: TUNING_DIODE.devicesPerWafer,
	law: {
		forward: { ideality: 1.1, saturationCurrent: 7.7e-16, seriesResistance: 0.7 },
		saturationEnergy: 1.02,
		saturationPower: 3,
		leakage: 0.5e-9,
		ratedVoltage: 28,
		leakageEnergy: 0.6,
		leakageGrowth: 1,
		breakdown: 38,
		breakdownDrift: 0.03,
		seriesResistance: 0.48,
		thermalResistance: 180
	},
	lotSpread: partOf(TUNING_SPREAD, 0.4),
	waferSpread: partOf(TUNING_SPREAD, 0.25),
	deviceSpread: TUNING_SPREAD,
	readings: [
		{
			characteristic: 'r_s',
			temperature: 25,
			frequency: 470,
			reverseVoltage: 4,
			unit: 'Ω',
			unitSize: 1,
			decimals: 3,
			noise: 0.01
		},
		{
			characteristic: 'I_R',
			temperature: 25,
			reverseVoltage: 28,
			unit: 'nA',
			unitSize: 1e-9,
			decimals: 2,
			noise: 0.02,
			floor: 0.1
		},
		{
			characteristic: 'I_R',
			temperature: 85,
			reverseVoltage: 28,
			unit: 'nA',
			unitSize: 1e-9,
			decimals: 2,
			noise: 0.02,
			floor: 0.1
		},
		{
			characteristic: 'V_(BR)',
			temperature: 25,
			reverseCurrent: 0.01,
			unit: 'V',
			unitSize: 1,
			decimals: 2,
			noise: 0.0005
		},
		{
			characteristic: 'V_F',
			temperature: 25,
			forwardCurrent: 0.01,
			unit: 'V',
			unitSize: 1,
			decimals: 4,
			noise: 0.0003
		}
	],
	faults: [{ lot: 'LK24-036', wafer: '12', device: 8, characteristic: 'V_F', added: 0.35 }]
};

const FORWARD_CURRENTS = [0.5, 1, 2];
const FORWARD_TEMPERATURES = [-40, 25, 125];

/** The rectifier: its clamp hides the breakdown of the best devices. */
const RECTIFIER_READINGS: ElectricalProduct = {
	partNumber: SCHOTTKY_RECTIFIER.partNumber,
	seed: SCHOTTKY_RECTIFIER.seed,
	lots: SCHOTTKY_RECTIFIER.lots,
	wafers: SCHOTTKY_RECTIFIER.wafers,
	devicesPerWafer: SCHOTTKY_RECTIFIER.devicesPerWafer,
	law: {
		forward: { ideality: 1.05, saturationCurrent: 1.2e-7, seriesResistance: 0.032 },
		saturationEnergy: 0.72,
		saturationPower: 2,
		leakage: 5e-6,
		ratedVoltage: 60,
		leakageEnergy: 0.72,
		leakageGrowth: 1.3,
		breakdown: 72,
		breakdownDrift: 0.04,
		seriesResistance: 0.032,
		thermalResistance: 18
	},
	lotSpread: partOf(RECTIFIER_SPREAD, 0.5),
	waferSpread: partOf(RECTIFIER_SPREAD, 0.3),
	deviceSpread: RECTIFIER_SPREAD,
	readings: [
		...FORWARD_TEMPERATURES.flatMap((temperature) =>
			FORWARD_CURRENTS.map((forwardCurrent) => ({
				characteristic: 'V_F' as const,
				temperature,
				forwardCurrent,
				unit: 'mV',
				unitSize: 1e-3,
				decimals: 1,
				noise: 0.0004
			}))
		),
		{
			characteristic: 'I_R',
			temperature: 25,
			reverseVoltage: 60,
			unit: 'µA',
			unitSize: 1e-6,
			decimals: 3,
			noise: 0.01
		},
		{
			characteristic: 'I_R',
			temperature: 125,
			reverseVoltage: 60,
			unit: 'mA',
			unitSize: 1e-3,
			decimals: 3,
			noise: 0.01
		},
		{
			characteristic: 'V_(BR)',
			temperature: 25,
			reverseCurrent: 1,
			unit: 'V',
			unitSize: 1,
			decimals: 2,
			noise: 0.0005,
			ceiling: 75
		},
		{
			characteristic: 'R_th(j-mb)',
			temperature: 25,
			unit: 'K/W',
			unitSize: 1,
			decimals: 2,
			noise: 0.01,
			devicesPerWafer: 3
		}
	],
	faults: [],
	sweeps: {
		temperatures: [25, 125],
		biases: [
			-60, -40, -20, -10, -5, -1, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3, 0.35, 0.4, 0.45, 0.5, 0.55
		],
		devicesPerWafer: 5
	}
};

export const ELECTRICAL_PRODUCTS: readonly ElectricalProduct[] = [
	TUNING_READINGS,
	RECTIFIER_READINGS
];
