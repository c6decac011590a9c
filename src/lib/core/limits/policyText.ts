import { canonicalize } from 'json-canonicalize';
import type { LimitPolicy } from './policy';

/** The rules of a policy as one canonical text (RFC 8785): its hash is the version's hash. */
export function policyText(rules: LimitPolicy): string {
	return canonicalize(rules);
}
