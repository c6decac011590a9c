import type { z } from 'zod';

/** One thing that stands in the way of a request, with its place in the request's body. */
export interface RequestProblem {
	/** As a script writes it: `capacitances[3]`; empty for the request as a whole. */
	readonly path: string;
	readonly message: string;
}

/** `['capacitances', 3]` as `capacitances[3]`. */
export function requestPath(path: readonly PropertyKey[]): string {
	return path
		.map((key) => (typeof key === 'number' ? `[${key}]` : `.${String(key)}`))
		.join('')
		.replace(/^\./, '');
}

/** What a schema found wrong, each with its place. */
export function schemaProblems(error: z.ZodError): RequestProblem[] {
	return error.issues.map(({ path, message }) => ({ path: requestPath(path), message }));
}

/** The first problem as a sentence, and how many more there are. */
export function firstProblem(problems: readonly RequestProblem[]): string {
	const [first] = problems;
	if (first === undefined) throw new RangeError('a refusal requires a problem, got none');
	const others = problems.length - 1;
	const said = first.path === '' ? first.message : `${first.path}: ${first.message}`;
	return others === 0 ? said : `${said} (and ${others} more, see \`errors\`)`;
}
