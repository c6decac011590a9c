import { execFileSync } from 'node:child_process';
import type { ExpectedRow } from './expectedTable';

/** `bias min typ max` and, after them, the signed deviation that only a C–V row has. */
const ROW = /^\s*(\d+(?:\.\d+)?)\s+(\d+(?:\.\d+)?)\s+(\d+(?:\.\d+)?)\s+(\d+(?:\.\d+)?)\s+[−+]/;

/** The text of a PDF as a reader copies it. */
export const pdfText = (path: string): string =>
	execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' });

/** The C–V table as it stands in a PDF. */
export function printedTable(path: string): ExpectedRow[] {
	return pdfText(path)
		.split('\n')
		.flatMap((line) => {
			const [, bias, minimum, typical, maximum] = ROW.exec(line) ?? [];
			if (!bias || !minimum || !typical || !maximum) return [];
			return [{ bias, minimum, typical, maximum }];
		});
}
