import type { Binding, BoundTexts } from './binding';
import { printsTheSame, type Part } from './boundTexts';
import type { SlotState } from './document';

type LimitPlaceBinding = Exclude<Binding, { kind: 'table' | 'rating' }>;

/**
 * How a bound limit stands against what the measurements say now.
 *
 * | now | kept by a person | state |
 * | --- | --- | --- |
 * | prints the same | – | bound |
 * | a required value is refused, or nothing is there | against this | overridden, else unsupported |
 * | prints something else | against this | overridden, else stale |
 */
export function limitState(
	binding: LimitPlaceBinding | null,
	current: BoundTexts | null,
	required: readonly Part[]
): SlotState {
	if (binding === null) return 'unbound';
	if (binding.kind === 'struck-out') return 'struck out';
	const carries = current !== null && required.every((part) => current[part] !== null);
	if (carries && printsTheSame(binding.printed, current)) return 'bound';
	if (binding.kept !== null && isTheSame(binding.kept.against, current)) return 'overridden';
	return carries ? 'stale' : 'unsupported';
}

function isTheSame(a: BoundTexts | null, b: BoundTexts | null): boolean {
	return a === null || b === null ? a === b : printsTheSame(a, b);
}
