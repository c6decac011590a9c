import type { CapacitanceModel } from './capacitanceModel';
import { BOLTZMANN_IN_VOLTS } from './constants';
import { JunctionDataError } from './errors';
import { growthAt, referencePotential, SPICE_DEFAULTS, type SpiceDiode } from './spiceParameters';

/** Simulators hold the grading exponent of a diode here, some of them silently. */
export const LARGEST_NATIVE_EXPONENT = 0.9;

/** Above this at some temperature of use, simulators may hold the junction potential (at 2 V). */
export const LARGEST_NATIVE_POTENTIAL = 1.6;

/** Whether the junction charge must be written out because a simulator would cut a parameter off. */
export function needsBehaviouralCharge(capacitance: CapacitanceModel): boolean {
	return (
		capacitance.gradingExponent > LARGEST_NATIVE_EXPONENT ||
		capacitance.junctionPotential > LARGEST_NATIVE_POTENTIAL
	);
}

export interface SpiceExport {
	/** Letters, digits and _, beginning with a letter. */
	readonly name: string;
	readonly capacitance: CapacitanceModel;
	/** Temperature of the fit in °C. */
	readonly nominalCelsius: number;
	/** Forward and breakdown parameters that were measured; the rest are the model's defaults. */
	readonly diode?: Partial<
		Omit<SpiceDiode, 'zeroBiasCapacitance' | 'junctionPotential' | 'gradingExponent'>
	>;
	/** Comment lines on top: what it is, from what it was fitted. */
	readonly notes?: readonly string[];
}

/** The parameters of an export, defaults filled in. */
export function spiceDiode({ capacitance, diode = {} }: SpiceExport): SpiceDiode {
	return {
		...SPICE_DEFAULTS,
		...diode,
		zeroBiasCapacitance: capacitance.zeroBiasCapacitance,
		junctionPotential: capacitance.junctionPotential,
		gradingExponent: capacitance.gradingExponent
	};
}

/**
 * The text of a SPICE model: a subcircuit (anode, cathode) of the Berkeley diode and, in parallel,
 * the capacitance of the package. A grading exponent above 0.9 or a junction potential near 2 V, which
 * simulators cut off, is carried by a capacitor with a behavioural charge instead of the diode's own
 * junction capacitance; its temperature behaviour is written out so that it follows the same law.
 *
 * @throws {JunctionDataError} for a name that a simulator would not read
 */
export function spiceModel(input: SpiceExport): string {
	const { name, capacitance, nominalCelsius, notes = [] } = input;
	if (!/^[A-Za-z][A-Za-z0-9_]*$/.test(name))
		throw new JunctionDataError('SPICE model name', 'letters, digits and _', name.length);
	const diode = spiceDiode(input);
	const isBehavioural = needsBehaviouralCharge(capacitance);
	const lines = [
		...notes.map((note) => `* ${note.replaceAll(/\s+/g, ' ')}`),
		`* ${isBehavioural ? 'junction charge written out' : 'junction capacitance of the diode model'}, fitted at ${number(nominalCelsius)} degC`,
		`.subckt ${name} a k`,
		`d1 a k ${name}_d`,
		`.model ${name}_d d(${diodeParameters(diode, nominalCelsius, isBehavioural)})`,
		...(isBehavioural ? behaviouralCharge(diode, nominalCelsius) : []),
		...(capacitance.caseCapacitance > 0
			? [`ccase a k ${number(capacitance.caseCapacitance)}`]
			: []),
		`.ends ${name}`
	];
	return `${lines.join('\n')}\n`;
}

/** Enough digits for a simulator, no more than were fitted. */
const number = (value: number) => String(Number(value.toPrecision(9)));

function diodeParameters(diode: SpiceDiode, nominal: number, isBehavioural: boolean): string {
	const parameters: [string, number | undefined][] = [
		['is', diode.saturationCurrent],
		['n', diode.emission],
		['rs', diode.seriesResistance],
		['cjo', isBehavioural ? 0 : diode.zeroBiasCapacitance],
		['vj', isBehavioural ? undefined : diode.junctionPotential],
		['m', isBehavioural ? undefined : diode.gradingExponent],
		['fc', diode.forwardCoefficient],
		['tt', diode.transitTime],
		['eg', diode.bandGap],
		['xti', diode.temperatureExponent],
		['bv', diode.breakdownVoltage],
		['ibv', diode.breakdownVoltage === undefined ? undefined : diode.breakdownCurrent],
		['tnom', nominal]
	];
	return parameters
		.flatMap(([key, value]) => (value === undefined ? [] : [`${key}=${number(value)}`]))
		.join(' ');
}

/**
 * Charge of the junction as an expression of v(a,k). Two internal nodes carry what moves with the
 * simulator's temperature: `p` the junction potential, `g` the growth of the zero-bias capacitance.
 * Up to FC·VJ the charge is the integral of the power law, above it that of its tangent.
 */
function behaviouralCharge(diode: SpiceDiode, nominalCelsius: number): string[] {
	const { gradingExponent: m, forwardCoefficient: fc } = diode;
	const reference = referencePotential(diode, nominalCelsius + 273.15);
	const atNominal = growthAt(diode, nominalCelsius + 273.15);
	const t = '(temper+273.15)';
	const k2 = number(2 * BOLTZMANN_IN_VOLTS);
	const gap = `(1.16-7.02e-4*${t}*${t}/(${t}+1108))`;
	const shift = `-${k2}*${t}*(1.5*ln(${t}/300.15)-${gap}/(${k2}*${t})+1.1150877/(${k2}*300.15))`;
	const power = (ratio: string) =>
		m === 1 ? `(-ln(${ratio}))` : `((1-(${ratio})^(${number(1 - m)}))/${number(1 - m)})`;
	const law = power('1-min(v(a,k)/v(p),' + number(fc) + ')');
	const beyond = `max(v(a,k)/v(p)-${number(fc)},0)`;
	const tangent = `${number((1 - fc) ** -m)}*${beyond}+${number(m / 2 / (1 - fc) ** (1 + m))}*${beyond}*${beyond}`;
	return [
		`bp p 0 v=${shift}+${t}/300.15*${number(reference)}`,
		`bg g 0 v=(1+${number(m)}*(4e-4*(${t}-300.15)-(v(p)-${number(reference)})/${number(reference)}))/${number(atNominal)}`,
		`cj a k q='${number(diode.zeroBiasCapacitance)}*v(g)*v(p)*(${law}+${tangent})'`
	];
}
