import { temperatureText } from '../../../../core/datasheet/conditionText';
import type { CharacteristicRow } from '../../../../core/datasheet/document';
import { symbolText } from '../../../../core/characteristics/symbol';
import { symbolRuns } from '../../../../core/datasheet/symbolRuns';
import type { Row, Section } from '../flow';
import { numberColumns, STATE_END, STATE_X } from '../numberColumns';
import { MEASURE, mm } from '../paper';
import { stateLabel, statusMark, type SectionOf, type Sheet } from '../sheet';
import { STYLES } from '../styles';
import {
	groupThousands,
	headBlock,
	ROW,
	rowBlock,
	rowRule,
	stateBoxWidth,
	strongRule,
	textCell,
	type Cell,
	type Column
} from '../table';
import { lineBoxes, oneLine, richSpans, symbolSpan } from '../typeset';
import { shortKey, termsBelow, termsLink } from './basisKey';
import { continuedHead, sectionHead } from './sectionHead';

const CONDITIONS_X = mm(73);

/** Rows of one characteristic at one temperature: symbol and name are printed once. */
interface Family {
	readonly temperature: number;
	readonly rows: readonly { readonly row: CharacteristicRow; readonly at: number }[];
}

/**
 * Characteristics with conditions, limits and basis, in groups by junction temperature; thermal ones
 * hold at any and stand in one group.
 */
export function characteristics(
	section: SectionOf<'characteristics' | 'thermal'>,
	sheet: Sheet
): Section {
	const { structure } = sheet;
	const isGrouped = section.kind === 'characteristics';
	const head = sectionHead(section.heading, isGrouped ? section.note : '', { structure });
	const table = structure.add('Table', structure.root);
	const texts = {
		minimum: groupThousands(section.rows.map((row) => row.minimum?.text ?? null)),
		typical: groupThousands(section.rows.map((row) => row.typical?.text ?? null)),
		maximum: groupThousands(section.rows.map((row) => row.maximum?.text ?? null))
	};
	const columns = numberColumns({ name: 'Characteristic', typical: 'Typ', basis: 'Basis' }, texts);
	const heads = headBlock(columns, { structure, table });
	const leadsTo = termsLink(section, sheet);
	const rows = families(section.rows).flatMap((family, at, all) => {
		const isNewTemperature = isGrouped && all[at - 1]?.temperature !== family.temperature;
		return [
			...(isNewTemperature ? [temperatureRow(family.temperature, sheet, table)] : []),
			...family.rows.map(({ row, at: place }, inFamily) =>
				characteristicRow(row, columns, sheet, {
					table,
					texts: {
						minimum: texts.minimum[place] ?? null,
						typical: texts.typical[place] ?? null,
						maximum: texts.maximum[place] ?? null
					},
					place: inFamily,
					familySize: family.rows.length,
					isFirstOfGroup: isNewTemperature && inFamily === 0,
					leadsTo
				})
			)
		];
	});
	const { terms, elsewhere } = termsBelow(section, sheet);
	return {
		title: section.heading,
		gapBefore: 'section',
		head,
		continued: continuedHead(section.heading),
		parts: [
			{
				kind: 'table',
				width: MEASURE,
				head: heads,
				rows,
				key: shortKey(
					sheet,
					section.rows.map(({ basis }) => basis),
					elsewhere
				),
				terms
			}
		]
	};
}

function families(rows: readonly CharacteristicRow[]): Family[] {
	const found: {
		temperature: number;
		key: string;
		rows: { row: CharacteristicRow; at: number }[];
	}[] = [];
	rows.forEach((row, at) => {
		const key = `${row.temperatureCelsius} ${symbolText(row.symbol)} ${row.name}`;
		const last = found.at(-1);
		if (last?.key === key) last.rows.push({ row, at });
		else found.push({ temperature: row.temperatureCelsius, key, rows: [{ row, at }] });
	});
	return found;
}

/** `T_j = 25 °C` across the table, in semi-bold. */
function temperatureRow(celsius: number, sheet: Sheet, table: number): Row {
	const { structure } = sheet;
	const row = structure.add('TR', table);
	const tag = structure.add('TH', row, { scope: 'Column', columnSpan: 8 });
	const runs = symbolRuns(`T_j = ${temperatureText(celsius)}`);
	return {
		height: ROW.height,
		boxes: lineBoxes(oneLine(richSpans(runs, STYLES.bodyBold)), { tag, x: 0, y: ROW.baseline }),
		rule: strongRule(),
		keepWithNext: true
	};
}

interface RowPlace {
	readonly table: number;
	readonly texts: {
		readonly minimum: string | null;
		readonly typical: string | null;
		readonly maximum: string | null;
	};
	/** Which row of its family it is. */
	readonly place: number;
	readonly familySize: number;
	readonly isFirstOfGroup: boolean;
	readonly leadsTo: string | undefined;
}

function characteristicRow(
	row: CharacteristicRow,
	columns: readonly Column[],
	sheet: Sheet,
	place: RowPlace
): Row {
	const label = stateLabel(sheet, row.state);
	const hasValue = row.minimum !== null || row.typical !== null || row.maximum !== null;
	const isFirst = place.place === 0;
	const limitMark = statusMark(sheet, 'limit');
	const covered: Cell = { kind: 'covered' };
	return rowBlock(
		columns,
		[
			isFirst ? { kind: 'text', spans: [symbolSpan(row.symbol, STYLES.body)] } : covered,
			isFirst ? { kind: 'text', spans: richSpans(symbolRuns(row.name), STYLES.body) } : covered,
			{ kind: 'text', spans: richSpans(row.conditions, STYLES.body, sheet.isProof) },
			{ kind: 'number', text: place.texts.minimum, mark: limitMark },
			label !== null && !hasValue
				? { kind: 'empty' }
				: { kind: 'number', text: place.texts.typical, mark: statusMark(sheet, 'typical') },
			{ kind: 'number', text: place.texts.maximum, mark: limitMark },
			textCell(row.unit, STYLES.body),
			{ kind: 'basis', basis: row.basis, leadsTo: place.leadsTo }
		],
		{
			structure: sheet.structure,
			table: place.table,
			header: 1,
			...(isFirst &&
				place.familySize > 1 && { spans: { 0: place.familySize, 1: place.familySize } }),
			rule: place.isFirstOfGroup ? null : rowRule(isFirst ? 0 : CONDITIONS_X),
			isChanged: sheet.changed.has(row.id),
			state:
				label === null ? null : { label, x: hasValue ? STATE_END - stateBoxWidth(label) : STATE_X },
			...(place.place < place.familySize - 1 && { keepWithNext: true })
		}
	);
}
