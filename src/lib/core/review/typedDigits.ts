import type { RichText } from '../datasheet/document';

/** A number as people write it in a sentence: sign, digits, decimal or thousands marks, a unit's %. */
const NUMBER = /[-+−±]?\d+(?:[.,\u202f]\d+)*/g;

/**
 * The numbers somebody typed into a text: bound values are left out, for they have rows of their
 * own, and so is the part number, which is a name.
 */
export function typedDigits(runs: RichText, partNumber: string): string[] {
	return runs.flatMap((run) =>
		run.kind === 'text' ? (run.text.replaceAll(partNumber, '').match(NUMBER) ?? []) : []
	);
}
