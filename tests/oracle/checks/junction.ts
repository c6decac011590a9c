import { z } from 'zod';
import { modelCapacitance } from '../../../src/lib/core/junction/capacitanceModel';
import {
	BOLTZMANN,
	BOLTZMANN_IN_VOLTS,
	ELEMENTARY_CHARGE,
	thermalVoltage,
	VACUUM_PERMITTIVITY
} from '../../../src/lib/core/junction/constants';
import { depletionWidth, dopingProfile } from '../../../src/lib/core/junction/dopingProfile';
import {
	reciprocalSquareLine,
	type ReciprocalSquareLine
} from '../../../src/lib/core/junction/reciprocalSquareLine';
import { LARGEST_NATIVE_EXPONENT } from '../../../src/lib/core/junction/spiceModel';
import {
	SPICE_DEFAULTS,
	spiceCapacitance,
	spicePotential,
	spiceZeroBiasCapacitance,
	type SpiceDiode
} from '../../../src/lib/core/junction/spiceParameters';
import { identifier, quantity, type Check } from '../check';
import { expectedOf, numberAt, numbersAt, objectAt, type Row } from '../rows';

const PER_CM3 = 1e6;
const SQUARE_CM = 1e-4;

/** Reads a line of this slope (1/(F²V), for an area of 1 m²) and intercept, of three exact points. */
function lineOf(
	slope: number,
	voltageIntercept: number,
	settings: {
		relativePermittivity: number;
		temperature: number;
		area: number;
		effectiveDensityOfStates?: number;
	}
): ReciprocalSquareLine {
	const biases = [0, 1, 4];
	const readings = biases.map((bias) => 1 / Math.sqrt(slope * (voltageIntercept + bias)));
	return reciprocalSquareLine(biases, readings, { ...settings, junction: 'metal-semiconductor' });
}

/** The line of a synthetic Schottky diode: from the formula's 1/C² back to its parameters. */
function syntheticLine({ inputs }: Row): ReciprocalSquareLine {
	const temperature = numberAt(inputs, 'T_K');
	const doping = numberAt(inputs, 'N_cm-3') * PER_CM3;
	const states = numberAt(inputs, 'Nc_cm-3') * PER_CM3;
	const area = numberAt(inputs, 'A_cm2') * SQUARE_CM;
	const relativePermittivity = numberAt(inputs, 'eps_r');
	const vt = thermalVoltage(temperature);
	const permittivity = relativePermittivity * VACUUM_PERMITTIVITY;
	const slope = 2 / (ELEMENTARY_CHARGE * permittivity * doping * area * area);
	const voltageIntercept = numberAt(inputs, 'phiB_V') - vt * Math.log(states / doping) - vt;
	return lineOf(slope, voltageIntercept, {
		relativePermittivity,
		temperature,
		area,
		effectiveDensityOfStates: states
	});
}

/** V_n = kT/q ln(N_C/N): what the barrier of a line lies above its built-in potential. */
function levelDifference(dopingPerCm3: number, statesPerCm3: number, vt: number): number {
	const permittivity = 11.7 * VACUUM_PERMITTIVITY;
	const slope = 2 / (ELEMENTARY_CHARGE * permittivity * dopingPerCm3 * PER_CM3);
	const line = lineOf(slope, 0.5, {
		relativePermittivity: 11.7,
		temperature: vt / BOLTZMANN_IN_VOLTS,
		area: 1,
		effectiveDensityOfStates: statesPerCm3 * PER_CM3
	});
	return (line.barrierHeight ?? NaN) - line.builtInPotential;
}

/** Doping in cm⁻³ from a slope in cm⁴/(F²V), silicon as the book has it. */
const dopingFromSlope = (slope: number, relativePermittivity = 11.7) =>
	lineOf(slope * SQUARE_CM ** 2, 0.5, {
		relativePermittivity,
		temperature: 300,
		area: 1
	}).doping / PER_CM3;

const TEXTBOOK: Readonly<Record<string, (row: Row) => number>> = {
	'H-const-q': () => ELEMENTARY_CHARGE,
	'H-const-k': () => BOLTZMANN,
	'H-const-eps0-2022': () => VACUUM_PERMITTIVITY,
	'H-kTq-bias': ({ inputs }) => -thermalVoltage(numberAt(inputs, 'T_K')),
	'H-neamen-W-phin': () => levelDifference(1e16, 2.8e19, 0.0259),
	'H-neamen-CV-phin': () => levelDifference(2.7e17, 2.8e19, 0.0259),
	'H-uri-Vn': () => levelDifference(1e17, 2.8e19, 0.0259),
	'H-sze-WSi-Vn': ({ inputs }) =>
		levelDifference(numberAt(inputs, 'Nd'), numberAt(inputs, 'Nc'), 0.0259),
	'H-neamen-CV-Nd': ({ inputs }) => dopingFromSlope(numberAt(inputs, 'slope_cm4_F2_V')),
	'H-neamen-p+n-Nd': ({ inputs }) => dopingFromSlope(numberAt(inputs, 'slope')),
	'H-sze-WSi-Nd': ({ inputs }) => dopingFromSlope(numberAt(inputs, 'slope'), 11.9),
	'H-sze-WSi-intercept': ({ inputs }) => {
		const [atMinusOne = NaN, atZero = NaN] = numbersAt(inputs, 'invC2');
		return lineOf(atMinusOne - atZero, atZero / (atMinusOne - atZero), {
			relativePermittivity: 11.7,
			temperature: 300,
			area: 1
		}).voltageIntercept;
	},
	'H-neamen-pn-W5': () =>
		1e6 *
		depletionWidth(expectedOf('H-neamen-pn-C') * 1e-12, { area: 1e-8, relativePermittivity: 11.7 }),
	'H-sze-Cj-W0': () => widthPerArea('H-sze-Cj-C0'),
	'H-sze-Cj-W4': () => widthPerArea('H-sze-Cj-C4'),
	'H-syn-Si-Vi': (row) => syntheticLine(row).voltageIntercept,
	'H-syn-4H-SiC-Vi': (row) => syntheticLine(row).voltageIntercept,
	'H-syn-Si-slope': (row) => syntheticLine(row).slope,
	'H-syn-4H-SiC-slope': (row) => syntheticLine(row).slope,
	'H-syn-GaAs-Vbi': (row) => syntheticLine(row).builtInPotential,
	'I-Mclamp': () => LARGEST_NATIVE_EXPONENT,
	'L-kev': () => BOLTZMANN_IN_VOLTS
};

/** Width in cm from a capacitance per cm². */
const widthPerArea = (id: string) =>
	1e2 * depletionWidth(expectedOf(id) * 1e4, { area: 1, relativePermittivity: 11.9 });

/** The synthetic diode as a power law through its own line. */
function syntheticCapacitance(row: Row): number {
	const line = syntheticLine(row);
	const model = {
		zeroBiasCapacitance: 1 / Math.sqrt(line.intercept),
		junctionPotential: line.voltageIntercept,
		gradingExponent: 0.5,
		caseCapacitance: 0
	};
	return modelCapacitance(model, -numberAt(row.inputs, 'V'));
}

/** Profile of NOTES: N(x) = 4e21 (1 + 3 exp(−x/0.6 µm)), by a narrow step around a width. */
function profileAt({ inputs }: Row): number {
	const settings = {
		area: numberAt(inputs, 'A_m2'),
		relativePermittivity: numberAt(inputs, 'eps_r')
	};
	const width = numberAt(inputs, 'W_m');
	const decay = 0.6e-6;
	const bending = (w: number) =>
		((ELEMENTARY_CHARGE * 4e21) / (settings.relativePermittivity * VACUUM_PERMITTIVITY)) *
		((w * w) / 2 + 3 * decay * (decay - (decay + w) * Math.exp(-w / decay)));
	const widths = [width * (1 - 1e-4), width * (1 + 1e-4)];
	const readings = widths.map((w) => depletionWidth(w, settings));
	return dopingProfile(widths.map(bending), readings, settings)[0]?.concentration ?? NaN;
}

const SPICE_KEYS: Readonly<Record<string, keyof SpiceDiode>> = {
	IS: 'saturationCurrent',
	N: 'emission',
	RS: 'seriesResistance',
	CJO: 'zeroBiasCapacitance',
	VJ: 'junctionPotential',
	M: 'gradingExponent',
	FC: 'forwardCoefficient',
	TT: 'transitTime',
	EG: 'bandGap',
	XTI: 'temperatureExponent',
	IBV: 'breakdownCurrent'
};

function spiceOf({ inputs }: Row) {
	const given = Object.entries(objectAt(inputs, 'model')).map(([key, value]) => [
		SPICE_KEYS[key] ?? key,
		value
	]);
	const named: Partial<SpiceDiode> = z
		.record(z.string(), z.number())
		.parse(Object.fromEntries(given));
	const diode: SpiceDiode = { ...SPICE_DEFAULTS, ...named };
	const temperature = numberAt(inputs, 'temp_C') + 273.15;
	const nominal = inputs['tnom_C'] === undefined ? 300.15 : numberAt(inputs, 'tnom_C') + 273.15;
	return { diode, temperature, nominal };
}

const isWithoutDiffusion = (row: Row) =>
	row.inputs['model'] === undefined || objectAt(row.inputs, 'model')['TT'] === 0;

/** Areas H and I: the depletion layer, and the SPICE model. */
export const JUNCTION_CHECKS: readonly Check[] = [
	{
		name: 'textbook examples and constants',
		covers: (row) => Object.hasOwn(TEXTBOOK, row.id),
		value: (row) => TEXTBOOK[row.id]?.(row) ?? NaN
	},
	{
		name: 'thermal voltage',
		covers: identifier(/^H-kTq-\d/),
		value: ({ inputs }) => thermalVoltage(numberAt(inputs, 'T_K'))
	},
	{
		name: 'capacitance of a Schottky diode',
		covers: quantity('H', 'Schottky capacitance, depletion approximation'),
		value: syntheticCapacitance
	},
	{
		name: 'depletion width',
		covers: quantity('H', 'apparent depletion width'),
		value: (row) =>
			1e6 *
			depletionWidth(syntheticCapacitance(row), {
				area: numberAt(row.inputs, 'A_cm2') * SQUARE_CM,
				relativePermittivity: numberAt(row.inputs, 'eps_r')
			})
	},
	{
		name: 'width and capacitance of a graded profile',
		covers: quantity('H', 'capacitance at that W'),
		value: ({ inputs }) =>
			depletionWidth(numberAt(inputs, 'W_m'), {
				area: numberAt(inputs, 'A_m2'),
				relativePermittivity: numberAt(inputs, 'eps_r')
			})
	},
	{
		name: 'doping profile',
		covers: quantity('H', 'profile value'),
		value: profileAt
	},
	{
		name: 'power law with a case',
		covers: quantity('H', 'total capacitance Cj0'),
		value: ({ inputs }) =>
			modelCapacitance(
				{
					zeroBiasCapacitance: numberAt(inputs, 'Cj0'),
					junctionPotential: numberAt(inputs, 'VJ'),
					gradingExponent: numberAt(inputs, 'M'),
					caseCapacitance: numberAt(inputs, 'Cp')
				},
				numberAt(inputs, 'VR')
			)
	},
	{
		name: 'power law of a textbook',
		covers: quantity('H', 'C=Cj0(1+VR/Vbi)'),
		value: ({ inputs }) =>
			modelCapacitance(
				{
					zeroBiasCapacitance: numberAt(inputs, 'Cj0_pF'),
					junctionPotential: numberAt(inputs, 'Vbi'),
					gradingExponent: 0.5,
					caseCapacitance: 0
				},
				numberAt(inputs, 'VR')
			)
	},
	{
		name: 'SPICE capacitance in reverse',
		covers: quantity('I', 'SPICE diode capacitance at reverse bias'),
		value: (row) => {
			const { diode, ...at } = spiceOf(row);
			return spiceCapacitance(diode, numberAt(row.inputs, 'VR'), at);
		}
	},
	{
		name: 'SPICE depletion capacitance in forward direction',
		covers: (row) =>
			quantity('I', 'SPICE diode capacitance at forward bias', 'default FC')(row) &&
			isWithoutDiffusion(row),
		value: (row) => {
			const { diode, ...at } = spiceOf(row);
			return spiceCapacitance(diode, -numberAt(row.inputs, 'VF'), at);
		}
	},
	{
		name: 'SPICE junction potential at temperature',
		covers: quantity('I', 'temperature-updated junction potential'),
		value: (row) => {
			const { diode, temperature, nominal } = spiceOf(row);
			return spicePotential(diode, temperature, nominal);
		}
	},
	{
		name: 'SPICE zero-bias capacitance at temperature',
		covers: quantity('I', 'temperature-updated zero-bias capacitance'),
		value: (row) => {
			const { diode, temperature, nominal } = spiceOf(row);
			return spiceZeroBiasCapacitance(diode, temperature, nominal);
		}
	},
	{
		name: 'SPICE defaults',
		covers: (row) => row.id.startsWith('I-default-') && SPICE_KEYS[row.id.slice(10)] !== undefined,
		value: (row) => {
			const key = SPICE_KEYS[row.id.slice(10)];
			return key === undefined ? NaN : (SPICE_DEFAULTS[key] ?? NaN);
		}
	}
];
