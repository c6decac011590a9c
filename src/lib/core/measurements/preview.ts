import { z } from 'zod';
import { columnMeaning, recogniseColumns } from './columns';
import { recogniseBiasSign } from './recogniseBiasSign';
import { fileDialect, recogniseDialect } from './dialect';
import type { FileDialect } from './dialect';
import { biasSign } from './mapping';
import { isComment, splitLine } from './splitLine';

/** What is shown of a file before it is mapped. */
export const uploadPreview = z.object({
	dialect: fileDialect,
	/** Lines of the whole file. */
	lineCount: z.number().int().min(0),
	columns: z.array(
		z.object({
			header: z.string(),
			/** As recognised; *ignore* when the header is not known. */
			meaning: columnMeaning,
			/** From the header, else `null`: it is asked for, never guessed. */
			unit: z.string().nullable()
		})
	),
	/** As recognised from the way capacitance falls; `null` when the data doesn't say. */
	biasSign: biasSign.nullable(),
	/** The first lines, as fields; a line that can't be cut is one field. */
	lines: z.array(z.object({ number: z.number().int(), fields: z.array(z.string()) }))
});
export type UploadPreview = z.infer<typeof uploadPreview>;

/** Lines shown. */
export const PREVIEW_LINES = 20;
/** Lines from which column kinds and bias sign are recognised. */
const SAMPLE_LINES = 2000;

export type PreviewOutcome =
	| { readonly status: 'read'; readonly preview: UploadPreview }
	| { readonly status: 'noTable' }
	| { readonly status: 'noData' };

/**
 * Recognises a file from its head.
 *
 * @param head the first lines, decoded, the last of them whole
 */
export function previewUpload(
	head: string,
	file: { readonly encoding: FileDialect['encoding']; readonly lineCount: number }
): PreviewOutcome {
	const dialect = recogniseDialect(head, file.encoding);
	if (dialect === undefined) return { status: 'noTable' };
	const all = head.split(/\r?\n/);
	const sample = sampleLines(all, dialect);
	if (sample.length === 0) return { status: 'noData' };

	// Lines that all end in a separator have no column behind it.
	const names =
		dialect.headerLine === 0
			? []
			: (splitLine(all[dialect.headerLine - 1] ?? '', dialect.separator) ?? []);
	const headers = distinct(
		Array.from(
			{ length: names.at(-1) === '' ? dialect.fieldCount - 1 : dialect.fieldCount },
			(_, position) => names[position] || `Column ${position + 1}`
		)
	);
	const recognised = recogniseColumns(headers);
	return {
		status: 'read',
		preview: {
			dialect: { ...dialect, fieldCount: headers.length },
			lineCount: file.lineCount,
			columns: headers.map((header, position) => ({
				header,
				meaning: recognised[position]?.meaning ?? 'ignore',
				unit: recognised[position]?.unit?.symbol ?? null
			})),
			biasSign: recogniseBiasSign(sample, recognised, dialect.decimalMark) ?? null,
			lines: sample.slice(0, PREVIEW_LINES)
		}
	};
}

type SampleLine = UploadPreview['lines'][number];

function sampleLines(all: readonly string[], dialect: FileDialect): SampleLine[] {
	return all
		.map((text, index) => ({ number: index + 1, text }))
		.slice(dialect.dataLine - 1)
		.filter(({ text }) => text.trim() !== '' && !isComment(text, dialect.commentPrefix))
		.slice(0, SAMPLE_LINES)
		.map(({ number, text }) => ({ number, fields: splitLine(text, dialect.separator) ?? [text] }));
}

/** A name that comes again gets its place behind it, so that each column can be spoken of. */
function distinct(headers: readonly string[]): string[] {
	return headers.map((header, position) =>
		headers.indexOf(header) === position ? header : `${header} (column ${position + 1})`
	);
}
