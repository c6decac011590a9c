import {
	activatedCurrent,
	activationEnergy
} from '../../../src/lib/core/junction/activationEnergy';
import { thermalVoltage } from '../../../src/lib/core/junction/constants';
import {
	qualityFactor,
	seriesResistanceFromQuality,
	temperatureCoefficient
} from '../../../src/lib/core/junction/derivedQuantities';
import {
	barrierFromSaturation,
	cheung,
	semilogarithmicLine
} from '../../../src/lib/core/junction/fitForward';
import { forwardCurrent, forwardVoltage } from '../../../src/lib/core/junction/forwardCurrent';
import { identifier, quantity, type Check } from '../check';
import { numberAt, numbersAt, type Row } from '../rows';
import { tableOf } from '../tables';

const KELVIN = 273.15;

/** The diode of the rows: a Schottky barrier with its area and Richardson constant. */
function diodeOf({ inputs }: Row) {
	const temperature = numberAt(inputs, 'T');
	const area = numberAt(inputs, 'A_cm2') * numberAt(inputs, 'Astar') * temperature ** 2;
	return {
		ideality: numberAt(inputs, 'n'),
		saturationCurrent: area * Math.exp(-numberAt(inputs, 'phiB') / thermalVoltage(temperature)),
		seriesResistance: numberAt(inputs, 'Rs')
	};
}

const SWEEP = { area: 1e-7, richardson: 112e4, temperature: 300 };

function sweep(keep: (voltage: number, current: number) => boolean) {
	const points = tableOf('forward_iv_synthetic.csv')
		.map((line) => ({ voltage: Number(line['V']), current: Number(line['I']) }))
		.filter(({ voltage, current }) => keep(voltage, current));
	return {
		voltages: points.map(({ voltage }) => voltage),
		currents: points.map(({ current }) => current)
	};
}

const straight = () => {
	const { voltages, currents } = sweep((voltage) => voltage > 0.159 && voltage < 0.301);
	return semilogarithmicLine(voltages, currents, 300);
};

/** Cheung's method with the exact derivative of the diode that made the sweep. */
function cheungOfSweep() {
	const { voltages, currents } = sweep((_, current) => current >= 1e-4);
	const saturation = 3.6648148443337446e-10;
	const derivatives = currents.map(
		(current) => current * 5 + (1.05 * thermalVoltage(300) * current) / (current + saturation)
	);
	return cheung(voltages, currents, SWEEP, derivatives);
}

const VALUES: Readonly<Record<string, (row: Row) => number>> = {
	'L-lnI-Is': () => straight().saturationCurrent,
	'L-lnI-phiB': () => barrierFromSaturation(straight().saturationCurrent, SWEEP),
	'L-cheung-Rs1': () => cheungOfSweep().seriesResistance,
	'L-cheung-Rs2': () => cheungOfSweep().seriesResistanceAgain,
	'L-cheung-phiB': () => cheungOfSweep().barrierHeight,
	'L-arrhenius-2pt': ({ inputs }) =>
		activationEnergy(
			[numberAt(inputs, 'T1_C') + KELVIN, numberAt(inputs, 'T2_C') + KELVIN],
			[numberAt(inputs, 'I1'), numberAt(inputs, 'I2')]
		),
	'K-Q': ({ inputs }) =>
		qualityFactor(numberAt(inputs, 'f'), numberAt(inputs, 'C'), numberAt(inputs, 'rs')),
	'K-rs-from-Q': ({ inputs }) =>
		seriesResistanceFromQuality(
			numberAt(inputs, 'f'),
			numberAt(inputs, 'C'),
			numberAt(inputs, 'Q')
		),
	'K-TCC-model': ({ inputs }) => {
		const [bias, potential] = [numberAt(inputs, 'VR'), numberAt(inputs, 'VJ')];
		const at = (offset: number) =>
			(1 + bias / (potential + numberAt(inputs, 'dVJdT') * offset)) ** -numberAt(inputs, 'M');
		return 1e6 * temperatureCoefficient([-0.01, 0.01], [at(-0.01), at(0.01)]);
	}
};

/** Area L and the electrical rows of K: forward current, leakage, quality. */
export const FORWARD_CHECKS: readonly Check[] = [
	{
		name: 'sweeps, leakage and quality',
		covers: (row) => Object.hasOwn(VALUES, row.id),
		value: (row) => VALUES[row.id]?.(row) ?? NaN
	},
	{
		name: 'forward current',
		covers: quantity('L', 'forward current with series resistance'),
		value: (row) =>
			forwardCurrent(diodeOf(row), numberAt(row.inputs, 'V'), numberAt(row.inputs, 'T'))
	},
	{
		name: 'forward voltage',
		covers: quantity('L', 'forward voltage at current'),
		value: (row) =>
			forwardVoltage(diodeOf(row), numberAt(row.inputs, 'I'), numberAt(row.inputs, 'T'))
	},
	{
		name: 'leakage at another temperature',
		covers: quantity('L', 'leakage at T'),
		value: ({ inputs }) =>
			activatedCurrent(numberAt(inputs, 'I25_A'), {
				from: 25 + KELVIN,
				to: numberAt(inputs, 'T_C') + KELVIN,
				energy: numberAt(inputs, 'Ea_eV')
			})
	},
	{
		name: 'ideality from two points',
		covers: identifier(/^L-threepoint-/),
		value: ({ inputs }) =>
			semilogarithmicLine(numbersAt(inputs, 'V'), numbersAt(inputs, 'I'), numberAt(inputs, 'T'))
				.ideality
	}
];
