import { modelCharge, modelEnergy } from '../junction/capacitanceModel';
import { sheetTexts } from '../messages/datasheet';
import type { ChartAxis, TemplateSection } from '../template/template';
import type { ChartCurve, DocumentSection } from './document';
import { fittedTable, typicalPoints, type TableSection } from './fittedTable';
import type { ResolveInput } from './resolveInput';
import { symbolRuns } from './symbolRuns';

type Template = Extract<TemplateSection, { kind: 'chart' }>;
type Section = Extract<DocumentSection, { kind: 'chart' }>;
type Drawn = Pick<Section, 'x' | 'y' | 'curves'>;

const REVERSE_VOLTAGE: ChartAxis = {
	symbol: { quantity: 'V', subscript: 'R' },
	unit: 'V',
	scale: 'linear'
};

/** Points of a computed curve: enough that straight lines between them look round. */
const STEPS = 60;

/**
 * A chart of what the sheet already prints, or of stored curves; `null` where there is nothing to
 * draw.
 *
 * @param table the table its source names, when it names one
 */
export function resolveChart(
	template: Template,
	{ curves }: Pick<ResolveInput, 'curves'>,
	table: TableSection | null
): Section | null {
	const { heading, caption, width, source } = template;
	const drawn =
		source.from === 'curves'
			? { x: source.x, y: source.y, curves: [...(curves?.get(source.curves) ?? [])] }
			: table === null
				? null
				: fromTable(source.show, table);
	if (drawn === null || drawn.curves.length === 0) return null;
	return { kind: 'chart', heading, caption: symbolRuns(caption), width, ...drawn, limits: [] };
}

function fromTable(
	show: 'inverse-square' | 'charge' | 'energy',
	table: TableSection
): Drawn | null {
	switch (show) {
		case 'inverse-square':
			return inverseSquare(table);
		case 'charge':
			return byLaw(table, {
				symbol: { quantity: 'Q', subscript: 'C' },
				unit: table.unit.replace('F', 'C'),
				of: modelCharge
			});
		case 'energy':
			return byLaw(table, {
				symbol: { quantity: 'E', subscript: 'C' },
				unit: table.unit.replace('F', 'J'),
				of: modelEnergy
			});
		default:
			return show satisfies never;
	}
}

/** 1/C² of the printed typical values: straight for an abrupt junction. */
function inverseSquare(table: TableSection): Drawn | null {
	const points = typicalPoints(table).map(({ bias, capacitance }): [number, number] => [
		bias,
		(table.unitScale / capacitance) ** 2
	]);
	return points.length < 2
		? null
		: {
				x: REVERSE_VOLTAGE,
				y: {
					symbol: { quantity: '1/C²', subscript: 'tot' },
					unit: `1/${table.unit}²`,
					scale: 'linear'
				},
				curves: [{ label: sheetTexts.typicalCurve(), points, isMeasured: true }]
			};
}

/** What the power law through the typical values gives, from 0 V to the highest bias. */
function byLaw(
	table: TableSection,
	quantity: {
		readonly symbol: ChartAxis['symbol'];
		readonly unit: string;
		readonly of: typeof modelCharge;
	}
): Drawn | null {
	const fitted = fittedTable(table);
	const highest = typicalPoints(table).at(-1)?.bias;
	if (fitted === null || highest === undefined) return null;
	const points = Array.from({ length: STEPS + 1 }, (_, at): [number, number] => {
		const bias = Number(((highest * at) / STEPS).toPrecision(6));
		const value = quantity.of(fitted.model, bias) / table.unitScale;
		return [bias, Number(value.toPrecision(6))];
	});
	const curve: ChartCurve = { label: sheetTexts.fittedCurve(), points, isMeasured: true };
	return {
		x: REVERSE_VOLTAGE,
		y: { symbol: quantity.symbol, unit: quantity.unit, scale: 'linear' },
		curves: [curve]
	};
}
