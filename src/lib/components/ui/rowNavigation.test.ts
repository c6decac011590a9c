import { expect, it } from 'vitest';
import { rowAfterKey } from './rowNavigation';

it.each([
	['j', -1, 3, 0],
	['j', 0, 3, 1],
	['ArrowDown', 2, 3, 2],
	['k', 2, 3, 1],
	['K', 0, 3, 0],
	['ArrowUp', -1, 3, 0],
	['Home', 2, 3, 0],
	['End', 0, 3, 2],
	['x', 0, 3, undefined],
	['j', 0, 0, undefined]
])('%s from row %i of %i … leads to %s', (key, current, count, next) =>
	expect(rowAfterKey(key, current, count)).toBe(next)
);
