import { symbolText } from '../characteristics/symbol';
import type { DatasheetDocument } from '../datasheet/document';
import {
	documentRows,
	documentTexts,
	type DocumentRow,
	type DocumentText
} from '../datasheet/documentRows';
import { plainText } from '../datasheet/plainText';
import { BASIS_MARKS } from '../limits/basis';
import { typedDigits } from './typedDigits';
import type { VerificationEvidence } from './verificationEvidence';

/** What a row of the sheet states, before anybody looked for evidence. */
export type RowStatement = Omit<
	VerificationEvidence,
	'computed' | 'previous' | 'risk' | 'concerns'
>;

export interface SheetRow {
	/** Id of the row or text within the document. */
	readonly row: string;
	readonly statement: RowStatement;
	/** The document's row, where one stands behind it. */
	readonly entry: DocumentRow | null;
}

/** A place that was struck out of the draft: it isn't printed, and somebody has to agree to that. */
export interface StruckOutPlace {
	readonly id: string;
	readonly label: string;
	readonly by: string;
	readonly reason: string;
}

const NOTHING = { minimum: null, typical: null, maximum: null };
const CHARACTERISTICS = 'Characteristics';

/** What is measured first, then what people typed: the capacitance tables lead. */
const ORDER = ['capacitance', 'characteristic', 'rating'] as const;

/** Every row of the verification sheet: the document's, then what is struck out, then texts. */
export function sheetRows(
	document: DatasheetDocument,
	struckOut: readonly StruckOutPlace[]
): SheetRow[] {
	return [
		...documentRows(document)
			.toSorted((a, b) => ORDER.indexOf(a.kind) - ORDER.indexOf(b.kind))
			.map((entry) => ({ row: entry.row.id, statement: statementOf(entry), entry })),
		...struckOut.map((place) => ({
			row: place.id,
			statement: struckOutStatement(place),
			entry: null
		})),
		...documentTexts(document).flatMap((text) => {
			const digits = typedDigits(text.runs, document.partNumber);
			return digits.length === 0
				? []
				: [{ row: text.id, statement: textStatement(text, digits), entry: null }];
		})
	];
}

function statementOf(entry: DocumentRow): RowStatement {
	switch (entry.kind) {
		case 'capacitance': {
			const { row, section } = entry;
			return {
				kind: 'capacitance',
				group: `C_tot Total capacitance, ${section.unit}`,
				groupConditions: plainText(section.conditions),
				label: `${row.bias.text} V`,
				unit: section.unit,
				printed: printedTexts(row.minimum, row.typical, row.maximum),
				basis: row.basis === null ? null : BASIS_MARKS[row.basis],
				note: '',
				digits: []
			};
		}
		case 'characteristic': {
			const { row } = entry;
			return {
				kind: 'characteristic',
				group: CHARACTERISTICS,
				groupConditions: '',
				label: symbolText(row.symbol),
				unit: row.unit,
				printed: printedTexts(row.minimum, row.typical, row.maximum),
				basis: row.basis === null ? null : BASIS_MARKS[row.basis],
				note: [row.name, plainText(row.conditions), `${row.temperatureCelsius} °C`]
					.filter((part) => part !== '')
					.join(', '),
				digits: []
			};
		}
		case 'rating': {
			const { row } = entry;
			const source =
				row.by === null ? '' : `typed by ${row.by}: ${row.reason ?? 'no reason given'}`;
			return {
				kind: 'rating',
				group: 'Limiting values',
				groupConditions: 'typed, no measurement stands behind them',
				label: symbolText(row.symbol),
				unit: row.unit,
				printed: printedTexts(row.minimum, null, row.maximum),
				basis: null,
				note: [row.name, plainText(row.conditions), source]
					.filter((part) => part !== '')
					.join('; '),
				digits: []
			};
		}
		default:
			return entry satisfies never;
	}
}

function struckOutStatement({ label, by, reason }: StruckOutPlace): RowStatement {
	return {
		kind: 'struck out',
		group: 'Struck out',
		groupConditions: 'asked for by the template, not printed',
		label,
		unit: '',
		printed: NOTHING,
		basis: null,
		note: `struck out by ${by}: ${reason}`,
		digits: []
	};
}

function textStatement(text: DocumentText, digits: string[]): RowStatement {
	return {
		kind: 'text',
		group: 'Digits in text',
		groupConditions: 'typed by people into headline, features and descriptions',
		label: text.label,
		unit: '',
		printed: NOTHING,
		basis: null,
		note: plainText(text.runs),
		digits
	};
}

type Printed = { readonly text: string } | null;

function printedTexts(minimum: Printed, typical: Printed, maximum: Printed) {
	return {
		minimum: minimum?.text ?? null,
		typical: typical?.text ?? null,
		maximum: maximum?.text ?? null
	};
}
