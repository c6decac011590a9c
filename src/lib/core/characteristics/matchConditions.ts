import { condition as schema, conditionKey, type Condition } from './condition';

const PARTS = schema.keyof().options;

/**
 * The stored conditions that a stated one speaks of: the very same, or else all that agree in every
 * part it states, of which it may state too few (a pulse duration, a frequency).
 */
export function matchConditions<T extends { readonly condition: Condition }>(
	stored: readonly T[],
	stated: Condition
): T[] {
	const key = conditionKey(stated);
	const same = stored.filter(({ condition }) => conditionKey(condition) === key);
	if (same.length > 0) return same;
	return stored.filter(({ condition }) =>
		PARTS.every((part) => stated[part] === undefined || stated[part] === condition[part])
	);
}
