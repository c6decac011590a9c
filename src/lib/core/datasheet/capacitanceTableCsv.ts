import { BASIS_WORDS } from '../limits/basis';
import type { DatasheetDocument, PrintedNumber } from './document';

const HEAD = [
	'temperature_celsius',
	'frequency_hertz',
	'reverse_voltage_volt',
	'capacitance_minimum',
	'capacitance_typical',
	'capacitance_maximum',
	'capacitance_unit',
	'basis'
];

/**
 * The printed capacitance tables as comma-separated values: the digits of the datasheet, one line a
 * bias, the unit in a column of its own; lines end with CRLF (RFC 4180). An empty field is a value
 * that isn't printed.
 */
export function capacitanceTableCsv(document: DatasheetDocument): string {
	const lines = document.sections.flatMap((section) =>
		section.kind === 'capacitance-table'
			? section.rows.map((row) => [
					String(section.temperatureCelsius),
					String(section.frequency),
					digits(row.bias),
					digits(row.minimum),
					digits(row.typical),
					digits(row.maximum),
					section.unit,
					row.basis === null ? '' : BASIS_WORDS[row.basis]
				])
			: []
	);
	return [HEAD, ...lines].map((line) => `${line.map(quoted).join(',')}\r\n`).join('');
}

/** Printed digits with the minus that programs read. */
function digits(number: PrintedNumber | null): string {
	return number?.text.replace('\u2212', '-') ?? '';
}

function quoted(field: string): string {
	return /[",\r\n]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field;
}
