import { expect, it } from 'vitest';
import { isOwnOrigin } from './ownOrigin';

const host = 'localhost:3000';

it.each([
	['http://localhost:3000', undefined, true],
	['https://localhost:3000', undefined, true],
	['http://localhost:3001', undefined, false],
	['http://localhost', undefined, false],
	['null', undefined, false],
	[null, undefined, false],
	['https://platen.example', 'https://platen.example', true],
	['http://platen.example', 'https://platen.example', false],
	['http://localhost:3000', 'https://platen.example', false],
	[null, 'https://platen.example', false]
])('takes the origin %s with ORIGIN %s: %s', (said, origin, isOwn) => {
	expect(isOwnOrigin(said, { origin, host })).toBe(isOwn);
});

it('takes nothing from a request without a host', () => {
	expect(isOwnOrigin('http://null', { origin: undefined, host: null })).toBe(false);
});
