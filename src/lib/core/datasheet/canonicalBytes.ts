import { canonicalize } from 'json-canonicalize';

/**
 * The one way a value is written as bytes before it is hashed: JSON with sorted keys, numbers and
 * strings as ECMAScript prints them, UTF-8 (RFC 8785). Equal values give equal bytes in any process.
 */
export function canonicalBytes(value: unknown): Uint8Array {
	return new TextEncoder().encode(canonicalize(value));
}
