/** A field of a CSV file, in quotes where the format asks for them (RFC 4180). */
function field(value: string | number | null): string {
	if (value === null) return '';
	if (typeof value === 'number') return String(value);
	// A spreadsheet would run what starts like a formula; the apostrophe makes it text.
	const safe = /^[=+@\t\r]|^-(?![\d.])/.test(value) ? `'${value}` : value;
	return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

/** Rows as a CSV file: commas, CRLF, a mark that says UTF-8 to spreadsheets. */
export function csvText(rows: readonly (readonly (string | number | null)[])[]): string {
	return `\ufeff${rows.map((row) => row.map(field).join(',')).join('\r\n')}\r\n`;
}
