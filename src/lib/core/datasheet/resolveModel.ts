import type { CapacitanceModel } from '../junction/capacitanceModel';
import { spiceModel } from '../junction/spiceModel';
import { sheetTexts } from '../messages/datasheet';
import { conditionText } from './conditionText';
import type { DocumentSection } from './document';
import { fittedTable, type TableSection } from './fittedTable';
import { isPrinted, type Place } from './place';
import { printNumber } from './printNumber';
import type { ResolveInput } from './resolveInput';
import { symbolRuns } from './symbolRuns';

type Section = Extract<DocumentSection, { kind: 'model' }>;
type Parameter = Section['parameters'][number];

/**
 * The model of a simulator: the power law through the printed typical capacitances, with series
 * resistance and breakdown voltage where the sheet prints them. `null` where no law fits.
 */
export function resolveModel(
	heading: string,
	{ product }: Pick<ResolveInput, 'product'>,
	table: TableSection,
	places: readonly Place[]
): Section | null {
	const fitted = fittedTable(table);
	if (fitted === null) return null;
	const { temperatureCelsius } = table;
	const [series, breakdown] = [
		printedAt(places, 'r_s', 'typical', temperatureCelsius),
		printedAt(places, 'V_(BR)', 'minimum', temperatureCelsius)
	];
	const worst = (fitted.worst * 100).toFixed(1);
	const note = sheetTexts.modelNote(fitted.pointCount, worst);
	return {
		kind: 'model',
		heading,
		conditions: symbolRuns(
			`${sheetTexts.typicalDevice()}, ${conditionText({ temperatureCelsius })}; ${sheetTexts.modelFile()}`
		),
		parameters: [
			...lawParameters(fitted.model, table),
			...(series === null ? [] : [named('RS', 'series resistance', series.text, series)]),
			...(breakdown === null
				? []
				: [named('BV', 'breakdown voltage, minimum', breakdown.text, breakdown)])
		],
		text: spiceModel({
			name: modelName(product.partNumber),
			capacitance: fitted.model,
			nominalCelsius: temperatureCelsius,
			diode: {
				...(series !== null && { seriesResistance: series.value }),
				...(breakdown !== null && { breakdownVoltage: breakdown.value })
			},
			notes: [`${product.partNumber}, ${sheetTexts.typicalDevice()}`, note]
		}),
		note
	};
}

function lawParameters(model: CapacitanceModel, { unit, unitScale }: TableSection): Parameter[] {
	const inUnit = (farads: number) => String(Number((farads / unitScale).toPrecision(4)));
	const capacitance = { unit, unitScale };
	return [
		named('CJO', 'zero-bias junction capacitance', inUnit(model.zeroBiasCapacitance), capacitance),
		named('VJ', 'junction potential', String(model.junctionPotential), { unit: 'V' }),
		named('M', 'grading exponent', String(model.gradingExponent), { unit: '' }),
		...(model.caseCapacitance > 0
			? [named('CC', 'case capacitance', inUnit(model.caseCapacitance), capacitance)]
			: [])
	];
}

function named(
	name: string,
	meaning: string,
	text: string,
	{ unit, unitScale = 1 }: { readonly unit: string; readonly unitScale?: number }
): Parameter {
	return { name, meaning, value: printNumber(text, unitScale), unit };
}

interface Printed {
	readonly text: string;
	readonly unit: string;
	readonly unitScale: number;
	/** In SI. */
	readonly value: number;
}

function printedAt(
	places: readonly Place[],
	name: string,
	part: 'minimum' | 'typical',
	temperatureCelsius: number
): Printed | null {
	for (const place of places) {
		const text = place.prints?.[part] ?? null;
		if (place.name !== name || text === null || !isPrinted(place)) continue;
		if (place.temperatureCelsius !== temperatureCelsius) continue;
		const { unit, unitScale } = place;
		return { text, unit, unitScale, value: printNumber(text, unitScale).value };
	}
	return null;
}

/** A name that simulators read: letters and digits, a letter first. */
const modelName = (partNumber: string) => {
	const plain = partNumber.replaceAll(/[^A-Za-z0-9]/g, '');
	return /^[A-Za-z]/.test(plain) ? plain : `D${plain}`;
};
