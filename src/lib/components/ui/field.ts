/** Errors as forms hand them over: one sentence, several, or none. */
export type FieldErrors = string | readonly string[] | undefined;

export function errorList(errors: FieldErrors): readonly string[] {
	if (errors === undefined) return [];
	return typeof errors === 'string' ? (errors === '' ? [] : [errors]) : errors;
}

/** Ids for `aria-describedby`, the error before the hint; `undefined` when there is neither. */
export function describedBy(
	id: string,
	said: { readonly hint?: string | undefined; readonly errors: readonly string[] }
): string | undefined {
	const ids = [
		...(said.errors.length > 0 ? [`${id}-error`] : []),
		...(said.hint ? [`${id}-hint`] : [])
	];
	return ids.length > 0 ? ids.join(' ') : undefined;
}

/** One line of the summary above a form. */
export interface SummaryLine {
	/** Id of the field it leads to; left out when it speaks of the whole form. */
	readonly field?: string;
	readonly message: string;
}

/**
 * The errors of a form as lines, in the order the form lists its fields. Nested rows are walked:
 * `{ codes: { 1: { code: ['…'] } } }` leads to the field `codes-1-code`.
 */
export function summaryLines(errors: unknown, path: readonly string[] = []): SummaryLine[] {
	if (Array.isArray(errors)) {
		const field = path.filter((step) => step !== '_errors').join('-');
		return errors
			.filter((entry): entry is string => typeof entry === 'string')
			.map((message) => (field === '' ? { message } : { field, message }));
	}
	if (typeof errors !== 'object' || errors === null) return [];
	return Object.entries(errors).flatMap(([key, inner]) => summaryLines(inner, [...path, key]));
}
