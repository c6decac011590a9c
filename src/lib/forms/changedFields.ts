/** A field that somebody else saved meanwhile, with what stands there now. */
export interface ChangedField {
	readonly name: string;
	readonly saved: string;
}

/**
 * What the stored version says differently from what a person typed, by the names the form gives its
 * fields; lists are joined by commas.
 */
export function changedFields<Form extends object>(
	typed: Form,
	saved: Form,
	names: Readonly<Partial<Record<keyof Form, string>>>
): ChangedField[] {
	const text = (value: unknown) => (Array.isArray(value) ? value.join(', ') : String(value));
	return (Object.keys(names) as (keyof Form)[]).flatMap((key) => {
		const [mine, theirs] = [text(typed[key]), text(saved[key])];
		return mine === theirs ? [] : [{ name: names[key] ?? '', saved: theirs }];
	});
}
