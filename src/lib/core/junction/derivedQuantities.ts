import { regressionLine } from '../stats/regressionLine';
import { JunctionDataError } from './errors';

/**
 * Ratio C(V_1)/C(V_2) of a tuning diode.
 *
 * @throws {JunctionDataError} unless both capacitances are positive
 */
export function capacitanceRatio(atLowBias: number, atHighBias: number): number {
	if (!(atLowBias > 0)) throw new JunctionDataError('ratio', 'positive capacitances', atLowBias);
	if (!(atHighBias > 0)) throw new JunctionDataError('ratio', 'positive capacitances', atHighBias);
	return atLowBias / atHighBias;
}

/** Q = 1/(2π f C r_s), from f in Hz, C in F, r_s in Ω. */
export function qualityFactor(
	frequency: number,
	capacitance: number,
	seriesResistance: number
): number {
	const product = 2 * Math.PI * frequency * capacitance * seriesResistance;
	if (!(product > 0))
		throw new JunctionDataError('quality factor', 'positive f, C and r_s', product);
	return 1 / product;
}

/** r_s = 1/(2π f C Q) in Ω, the same relation turned round. */
export function seriesResistanceFromQuality(
	frequency: number,
	capacitance: number,
	quality: number
): number {
	return qualityFactor(frequency, capacitance, quality);
}

/**
 * Temperature coefficient (1/C) dC/dT in 1/K: the slope of ln C against temperature, by the
 * difference of two temperatures or the line through more.
 *
 * @param temperatures - in K or °C, at least two that differ
 * @throws {JunctionDataError} for fewer than two, or a capacitance not above zero
 */
export function temperatureCoefficient(
	temperatures: readonly number[],
	capacitances: readonly number[]
): number {
	if (temperatures.length < 2)
		throw new JunctionDataError(
			'temperature coefficient',
			'at least 2 temperatures',
			temperatures.length
		);
	const logs = capacitances.map((value) => {
		if (!(value > 0))
			throw new JunctionDataError('temperature coefficient', 'positive capacitances', value);
		return Math.log(value);
	});
	if (temperatures.length > 2) return regressionLine(temperatures, logs).slope;
	const span = temperatures[1]! - temperatures[0]!;
	if (span === 0)
		throw new JunctionDataError('temperature coefficient', 'temperatures that differ', 0);
	return (logs[1]! - logs[0]!) / span;
}
