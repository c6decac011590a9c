import { symbolRuns } from './symbolRuns';
import type { TemplateSection } from '../template/template';
import { inUnit, type Part } from './boundTexts';
import { conditionText } from './conditionText';
import { deviationPercent, ratioText } from './decimalText';
import type { CapacitanceRow, DocumentSection } from './document';
import type { Place } from './place';
import { printNumber, printOptional } from './printNumber';
import type { PrintedTexts } from './resolveInput';
import { sheetTexts } from '../messages/datasheet';

type Table = Extract<TemplateSection, { kind: 'capacitance-table' }>;
type TableSection = Extract<DocumentSection, { kind: 'capacitance-table' }>;
type ChartSection = Extract<DocumentSection, { kind: 'capacitance-chart' }>;

/**
 * The C(V) table in one unit, that of most of its rows. Deviations and ratio are computed from the
 * printed digits, so that a reader can redo them.
 */
export function resolveTable(table: Table, places: readonly Place[]): TableSection {
	const { unit, unitScale } = commonUnit(places);
	const printed = new Map(places.map((place) => [place.bias, textsIn(place, unit, unitScale)]));
	const reference = table.ratioTo === null ? null : (printed.get(table.ratioTo)?.typical ?? null);
	const { temperatureCelsius, frequency } = table;
	return {
		kind: 'capacitance-table',
		heading: table.heading,
		slot: table.slot,
		conditions: symbolRuns(conditionText({ frequency, temperatureCelsius })),
		temperatureCelsius,
		frequency,
		unit,
		unitScale,
		ratioTo: table.ratioTo,
		rows: places.map((place) =>
			tableRow(place, printed.get(place.bias) ?? null, reference, unitScale)
		)
	};
}

function tableRow(
	place: Place,
	texts: PrintedTexts | null,
	reference: string | null,
	unitScale: number
): CapacitanceRow {
	const { id, slot, state, trace } = place;
	const typical = texts?.typical ?? null;
	const deviation = (limit: string | null | undefined) =>
		limit === null || limit === undefined || typical === null
			? null
			: printOptional(deviationPercent(limit, typical), 1);
	const ratio = typical === null || reference === null ? null : ratioText(typical, reference);
	return {
		id,
		slot,
		state,
		trace,
		bias: printNumber(String(place.bias ?? 0), 1),
		minimum: printOptional(texts?.minimum ?? null, unitScale),
		typical: printOptional(typical, unitScale),
		maximum: printOptional(texts?.maximum ?? null, unitScale),
		deviationMinimum: deviation(texts?.minimum),
		deviationMaximum: deviation(texts?.maximum),
		ratio: printOptional(ratio, 1),
		basis: texts === null ? null : place.basis
	};
}

/** The chart's marked points are the printed table: nothing is drawn that isn't printed. */
export function chartOf(heading: string, { conditions, unit, rows }: TableSection): ChartSection {
	return {
		kind: 'capacitance-chart',
		heading,
		conditions,
		caption: [{ kind: 'text', text: sheetTexts.chartCaption() }],
		unit,
		points: rows.flatMap(({ bias, minimum, typical, maximum, basis }) =>
			typical === null
				? []
				: [
						{
							bias: bias.value,
							minimum: plain(minimum),
							typical: Number(unspaced(typical.text)),
							maximum: plain(maximum),
							basis
						}
					]
		)
	};
}

const unspaced = (text: string) => text.replaceAll('\u00a0', '').replace('−', '-');
const plain = (of: { readonly text: string } | null) =>
	of === null ? null : Number(unspaced(of.text));

function textsIn(place: Place, unit: string, unitScale: number): PrintedTexts | null {
	if (place.prints === null) return null;
	return inUnit({ ...place.prints, unitScale: place.unitScale }, unit, unitScale);
}

function commonUnit(places: readonly Place[]): { unit: string; unitScale: number } {
	const counts = new Map<string, { unit: string; unitScale: number; rows: number }>();
	for (const { prints, current, unitScale } of places) {
		const unit = prints?.unit ?? current?.unit;
		if (unit === undefined) continue;
		const scale = prints === null ? (current?.unitScale ?? 1) : unitScale;
		const rows = (counts.get(unit)?.rows ?? 0) + 1;
		counts.set(unit, { unit, unitScale: scale, rows });
	}
	const [most] = [...counts.values()].sort((a, b) => b.rows - a.rows);
	return most ?? { unit: 'pF', unitScale: 1e-12 };
}

/** The parts a place prints, in the order of the columns. */
export function printedParts(texts: PrintedTexts | null): Part[] {
	const parts: readonly Part[] = ['minimum', 'typical', 'maximum'];
	return texts === null ? [] : parts.filter((part) => texts[part] !== null);
}
