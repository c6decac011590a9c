/** What a reading says of its value: at most (−1), exactly (0), at least (1). */
export type CensorFlag = -1 | 0 | 1;

const FLAGS = new Map<string, CensorFlag>([
	['', 0],
	['=', 0],
	['0', 0],
	['<', -1],
	['<=', -1],
	['≤', -1],
	['-1', -1],
	['>', 1],
	['>=', 1],
	['≥', 1],
	['1', 1]
]);

/** The mark of a flag as an export writes it and an upload reads it again; none for an exact value. */
export function censorMark(flag: number): '' | '<=' | '>=' {
	if (flag === 0) return '';
	return flag < 0 ? '<=' : '>=';
}

/** A field of a flag column; `undefined` when it is no flag. */
export function readCensorFlag(text: string): CensorFlag | undefined {
	return FLAGS.get(text.trim());
}

/** A value with the sign before it: `<0.1` is at most 0.1. */
export function splitMark(text: string): { readonly flag: CensorFlag; readonly number: string } {
	const { mark = '', number = '' } =
		/^(?<mark>[<>]=?|[≤≥])?\s*(?<number>.*)$/.exec(text.trim())?.groups ?? {};
	return { flag: FLAGS.get(mark) ?? 0, number };
}
