import { inconsistencies } from './inconsistencies';
import { template, type Template } from './template';

/** A template that isn't one: every place that is wrong, each with its path. */
export class TemplateError extends Error {
	override readonly name = 'TemplateError';

	constructor(
		readonly source: string,
		readonly problems: readonly string[]
	) {
		super(`${source} is not a datasheet template: ${problems.join('; ')}`);
	}
}

/**
 * Reads a template from JSON text.
 *
 * @param source what the text is called in an error: a file name, or key and version
 * @throws {TemplateError} for text that isn't JSON or doesn't have the template's shape
 */
export function readTemplate(text: string, source: string): Template {
	let json: unknown;
	try {
		json = JSON.parse(text);
	} catch {
		throw new TemplateError(source, ['expected JSON']);
	}
	return parseTemplate(json, source);
}

/** As `readTemplate`, of JSON that is parsed already. */
export function parseTemplate(json: unknown, source: string): Template {
	const parsed = template.safeParse(json);
	const problems = parsed.success
		? inconsistencies(parsed.data).map(({ path, ...rest }) => ({
				path: ['sections', ...path],
				...rest
			}))
		: parsed.error.issues;
	if (!parsed.success || problems.length > 0)
		throw new TemplateError(source, problems.map(describeProblem));
	return parsed.data;
}

/** `sections.3.slots.0.unit: Invalid input: expected string, received number`. */
function describeProblem({
	path,
	message
}: {
	readonly path: readonly PropertyKey[];
	readonly message: string;
}): string {
	return path.length === 0 ? message : `${path.map(String).join('.')}: ${message}`;
}
