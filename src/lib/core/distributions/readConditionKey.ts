import { condition, CONDITION_KEYS, type Condition } from '../characteristics/condition';

const FIELDS = new Map<string, keyof Condition>(
	condition.keyof().options.map((part) => [CONDITION_KEYS[part], part])
);

/**
 * The condition that `conditionKey` wrote.
 *
 * @throws {RangeError} for a text it doesn't write
 */
export function readConditionKey(key: string): Condition {
	const fields = key.split(';').map((part): [string, number] => {
		const [name = '', value = ''] = part.split('=');
		return [FIELDS.get(name) ?? name, value === '' ? Number.NaN : Number(value)];
	});
	const parsed = condition.strict().safeParse(Object.fromEntries(fields));
	if (!parsed.success) throw new RangeError(`condition key requires T=…;f=…;VR=…, got "${key}"`);
	return parsed.data;
}
