import Papa from 'papaparse';

/** What may stand between fields, in the order of trial. */
export const SEPARATORS = ['\t', ';', '|', ','] as const;
export type Separator = (typeof SEPARATORS)[number];

/**
 * The fields of one line, without the blanks around them and unquoted; `undefined` when a quote
 * does not end in the line.
 */
export function splitLine(line: string, separator: Separator): string[] | undefined {
	// Without a quote there is nothing to parse, and most lines have none.
	if (!line.includes('"')) return line.split(separator).map((field) => field.trim());
	const { data, errors } = Papa.parse<string[]>(line, {
		delimiter: separator,
		newline: '\n',
		quoteChar: '"'
	});
	const [fields] = data;
	if (errors.length > 0 || fields === undefined) return undefined;
	return fields.map((field) => field.trim());
}

/** Whether a line is a remark between the data. */
export function isComment(line: string, prefix: string): boolean {
	return prefix !== '' && line.trimStart().startsWith(prefix);
}
