import { z } from 'zod';
import { readNumber } from '../units/readNumber';
import type { DecimalMark } from '../units/readNumber';
import { isComment, SEPARATORS, splitLine } from './splitLine';
import type { Separator } from './splitLine';

/** How a file writes its lines. */
export const fileDialect = z.object({
	encoding: z.enum(['utf-8', 'windows-1252']),
	separator: z.enum(SEPARATORS),
	decimalMark: z.enum(['.', ',']),
	/** What begins a comment line; empty when the file has none. */
	commentPrefix: z.enum(['', '#', '%', '!', '//']),
	/** The line of the column names, counted from 1; 0 when there is none. */
	headerLine: z.number().int().min(0),
	/** The first line of data. */
	dataLine: z.number().int().min(1),
	/** Fields of a line. */
	fieldCount: z.number().int().min(2)
});
export type FileDialect = z.infer<typeof fileDialect>;

/** A line of the head of a file, with its number. */
interface Line {
	readonly number: number;
	readonly text: string;
}

const PREFIXES = ['#', '%', '!', '//'] as const;
/** Lines looked at; what an instrument writes above its table is rarely longer. */
const LOOKED_AT = 200;

/**
 * How the head of a file is written, or `undefined` when it is no table with numbers in it.
 *
 * The separator is the first of tab, semicolon, bar and comma that cuts most lines into the same
 * number of fields; comma comes last, because it may be the decimal mark.
 */
export function recogniseDialect(
	head: string,
	encoding: FileDialect['encoding']
): FileDialect | undefined {
	const lines = head
		.split(/\r?\n/)
		.slice(0, LOOKED_AT)
		.map((text, index) => ({ number: index + 1, text }))
		.filter(({ text }) => text.trim() !== '');
	for (const separator of SEPARATORS) {
		const found = readAs(lines, separator, encoding);
		if (found !== undefined) return found;
	}
	return undefined;
}

function readAs(
	lines: readonly Line[],
	separator: Separator,
	encoding: FileDialect['encoding']
): FileDialect | undefined {
	const commentPrefix = PREFIXES.find((prefix) => isComment(lines[0]?.text ?? '', prefix)) ?? '';
	const table = lines
		.filter(({ text }) => !isComment(text, commentPrefix))
		.map(({ number, text }) => ({ number, fields: splitLine(text, separator) ?? [] }));
	const fieldCount = commonest(table.map(({ fields }) => fields.length));
	if (fieldCount < 2) return undefined;

	const regular = table.filter(({ fields }) => fields.length === fieldCount);
	if (regular.length * 2 <= table.length) return undefined;
	const decimalMark =
		separator === ',' ? '.' : recogniseMark(regular.flatMap(({ fields }) => fields));
	const numbers = ({ fields }: { readonly fields: readonly string[] }) =>
		fields.filter((field) => readNumber(field, decimalMark) !== undefined).length;

	// Names have fewer numbers among them than the lines below.
	const most = Math.max(...regular.map(numbers));
	const [first, second] = regular;
	if (most === 0 || first === undefined) return undefined;
	const hasHeader = numbers(first) < most;
	const data = hasHeader ? second : first;
	if (data === undefined) return undefined;
	return {
		encoding,
		separator,
		decimalMark,
		commentPrefix,
		headerLine: hasHeader ? first.number : 0,
		dataLine: data.number,
		fieldCount
	};
}

function recogniseMark(fields: readonly string[]): DecimalMark {
	const isWritten = (mark: DecimalMark) =>
		fields.some((field) => field.includes(mark) && readNumber(field, mark) !== undefined);
	return isWritten(',') && !isWritten('.') ? ',' : '.';
}

function commonest(values: readonly number[]): number {
	const counts = new Map<number, number>();
	for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1);
	return [...counts].reduce(
		([best, most], [value, count]) => (count > most ? [value, count] : [best, most]),
		[0, 0]
	)[0];
}
