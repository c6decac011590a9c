import { z } from 'zod';

/** A line that can't be used, and why. */
export const lineProblem = z.object({
	/** Counted from 1 in the file. */
	line: z.number().int().positive(),
	/** The line as it was read, cut to a readable length. */
	read: z.string(),
	message: z.string()
});
export type LineProblem = z.infer<typeof lineProblem>;

/** What stood in the way of an upload. */
export const uploadProblems = z.object({
	/** What is wrong with the file as a whole; `null` when only lines are. */
	message: z.string().nullable(),
	/** All lines that can't be used. */
	total: z.number().int().min(0),
	/** The first of them. */
	lines: z.array(lineProblem)
});
export type UploadProblems = z.infer<typeof uploadProblems>;

/** Problems kept one by one; the others are counted. */
export const KEPT_PROBLEMS = 200;
const KEPT_CHARACTERS = 160;

/** Gathers the problems of a file as it is read. */
export class ProblemList {
	readonly #lines: LineProblem[] = [];
	#total = 0;

	/** @param read gives the line's text; asked only for problems that are kept */
	add(line: number, read: () => string, message: string): void {
		this.#total += 1;
		if (this.#lines.length >= KEPT_PROBLEMS) return;
		const text = read();
		this.#lines.push({
			line,
			read: text.length > KEPT_CHARACTERS ? `${text.slice(0, KEPT_CHARACTERS)}…` : text,
			message
		});
	}

	get total(): number {
		return this.#total;
	}

	get lines(): readonly LineProblem[] {
		return this.#lines;
	}
}
