import { expect, it } from 'vitest';
import { bodyLimit, FORM_FILE_LIMIT } from './bodyLimit';

it.each([
	['/api/v1/products/LKT-1130/measurement-sets', Infinity],
	['/products/LKT-1130/measurements', FORM_FILE_LIMIT + 1_000_000],
	['/api/v1/products/LKT-1130/measurement-sets/more', 1_000_000],
	['/api/v1/uploads/1/mapping', 1_000_000],
	['/sign-in', 1_000_000]
])('%s takes %d bytes', (path, limit) => {
	expect(bodyLimit(path)).toBe(limit);
});
