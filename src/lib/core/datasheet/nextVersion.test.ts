import { describe, expect, it } from 'vitest';
import type { Change } from './change';
import { nextVersion } from './nextVersion';

const changed = (area: Change['area']): Change => ({
	kind: 'text',
	area,
	row: 'a',
	label: 'a',
	part: 'a',
	before: null,
	after: null,
	relative: null
});

describe('the first release', () => {
	it.each([
		['production', { major: 1, minor: 0 }],
		['preliminary', { major: 0, minor: 1 }],
		['target', { major: 0, minor: 1 }]
	] as const)('of a %s datasheet', (status, version) => {
		expect(nextVersion([], status, [])).toEqual(version);
	});
});

describe('before production', () => {
	it('counts up in the minor, whatever changed', () => {
		expect(nextVersion([{ major: 0, minor: 9 }], 'preliminary', [changed('guarantee')])).toEqual({
			major: 0,
			minor: 10
		});
	});

	it('goes to 1.0 with the first production datasheet', () => {
		expect(nextVersion([{ major: 0, minor: 3 }], 'production', [])).toEqual({ major: 1, minor: 0 });
	});
});

describe('after 2.3', () => {
	const used = [
		{ major: 2, minor: 3 },
		{ major: 1, minor: 0 },
		{ major: 2, minor: 0 }
	];

	it.each(['guarantee', 'condition', 'basis', 'rating'] as const)('a %s is major', (area) => {
		expect(nextVersion(used, 'production', [changed('text'), changed(area)])).toEqual({
			major: 3,
			minor: 0
		});
	});

	it.each(['typical', 'text', 'ordering'] as const)('%s alone is minor', (area) => {
		expect(nextVersion(used, 'production', [changed(area)])).toEqual({ major: 2, minor: 4 });
	});

	it('never uses the number of a withdrawn release again', () => {
		expect(
			nextVersion([...used, { major: 3, minor: 0 }], 'production', [changed('rating')])
		).toEqual({ major: 4, minor: 0 });
	});
});
