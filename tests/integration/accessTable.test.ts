import { expect, it } from 'vitest';
import { ACCESS } from './access';
import { allEntries } from './entries';

it('lists every load, action and endpoint, and nothing else', () => {
	expect(Object.keys(ACCESS).toSorted()).toEqual(
		allEntries()
			.map(({ name }) => name)
			.toSorted()
	);
});
