import { medianJunction } from '$lib/core/junction/medianJunction';
import { spiceModel } from '$lib/core/junction/spiceModel';
import type { CapacitanceCurve } from './capacitanceCurve';
import { medianSweep } from './curveJunction';

/**
 * The SPICE model of the median device of a curve, its head saying from what it was fitted;
 * `undefined` where no law can be fitted.
 */
export function medianSpice(
	product: { readonly partNumber: string; readonly basisHash: string | null },
	curve: CapacitanceCurve
): string | undefined {
	const sweep = medianSweep(curve);
	const found = medianJunction(sweep);
	if (found === undefined) return undefined;
	const { model, residualRms } = found.fit;
	const { biases } = sweep;
	const measured = curve.rows.filter(({ distribution }) => distribution.origin === 'measured');
	const most = (numbers: readonly number[]) => Math.max(0, ...numbers);
	const devices = most(measured.map(({ distribution }) => distribution.sampleSize));
	const lots = most(measured.map(({ distribution }) => distribution.independentLots));
	const sets = [...new Set(measured.flatMap(({ distribution }) => distribution.sets))].sort(
		(a, b) => a - b
	);
	const figures = (value: number) => Number(value.toPrecision(5));
	const at = [
		`${curve.temperatureCelsius} degC`,
		...(curve.frequency === undefined ? [] : [`${curve.frequency} Hz`])
	].join(', ');
	return spiceModel({
		name: subcircuitName(product.partNumber),
		capacitance: model,
		nominalCelsius: curve.temperatureCelsius,
		notes: [
			`${product.partNumber}, typical device: junction capacitance`,
			`fitted to the medians of ${devices} devices of ${lots} lots at ${at}`,
			`${biases.length} biases from ${biases[0]} V to ${biases.at(-1)} V reverse`,
			`CJ0 ${figures(model.zeroBiasCapacitance)} F, VJ ${figures(model.junctionPotential)} V, M ${figures(model.gradingExponent)}, case ${figures(model.caseCapacitance)} F`,
			`residual ${residualText(residualRms)} percent rms`,
			`measurement sets ${sets.join(', ')}, data ${product.basisHash?.slice(0, 16) ?? 'unknown'}`,
			...found.warnings,
			'current, breakdown and transit time are defaults of the model, not measured'
		].map(inAscii)
	});
}

/** A name a simulator reads: letters, digits and _, beginning with a letter. */
function subcircuitName(partNumber: string): string {
	const name = partNumber.replaceAll(/[^A-Za-z0-9]+/g, '_');
	return /^[A-Za-z]/.test(name) ? name : `d_${name}`;
}

function residualText(rms: number): string {
	const percent = rms * 100;
	return percent < 0.001 ? 'below 0.001' : String(Number(percent.toPrecision(2)));
}

/** Old simulators read no more: typographic signs become plain ones. */
const inAscii = (text: string) =>
	text
		.replaceAll('’', "'")
		.replaceAll('±', '+/-')
		.replaceAll(/[\u2212\u2013]/g, '-')
		.replaceAll('\u00a0', ' ')
		.replaceAll(/[^\x20-\x7e]/g, '?');
