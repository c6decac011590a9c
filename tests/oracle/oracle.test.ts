import { expect, it } from 'vitest';
import { deviation, type Check } from './check';
import { COVERAGE_CHECKS } from './checks/coverage';
import { DECISION_CHECKS } from './checks/decision';
import { FACTOR_CHECKS } from './checks/factors';
import { FORWARD_CHECKS } from './checks/forward';
import { JUNCTION_CHECKS } from './checks/junction';
import { LOT_CHECKS } from './checks/lots';
import { SCREENED_CHECKS } from './checks/screened';
import { SHAPE_CHECKS } from './checks/shape';
import { OUTSIDE } from './outside';
import { ROWS } from './rows';

const CHECKS: readonly Check[] = [
	...FACTOR_CHECKS,
	...LOT_CHECKS,
	...COVERAGE_CHECKS,
	...SHAPE_CHECKS,
	...JUNCTION_CHECKS,
	...FORWARD_CHECKS,
	...DECISION_CHECKS,
	...SCREENED_CHECKS
];

// Each row carries its own source: published table, textbook, or the library call it came from.
it.each(CHECKS)('$name: every reference within its stated tolerance', ({ covers, value }) => {
	const rows = ROWS.filter(covers);
	expect(rows.length).toBeGreaterThan(0);
	expect(rows.flatMap((row) => deviation(row, value(row)) ?? [])).toEqual([]);
});

it('reads every reference row: each is checked once or outside for a stated reason', () => {
	const unread = ROWS.filter(
		(row) => !CHECKS.some(({ covers }) => covers(row)) && !OUTSIDE.some(({ covers }) => covers(row))
	);
	const twice = ROWS.filter(
		(row) =>
			CHECKS.filter(({ covers }) => covers(row)).length > 1 ||
			OUTSIDE.filter(({ covers }) => covers(row)).length > 1
	);
	expect(unread.map(({ id }) => id)).toEqual([]);
	expect(twice.map(({ id }) => id)).toEqual([]);
});

it('has no reason without a row', () => {
	const idle = OUTSIDE.filter(({ covers }) => !ROWS.some(covers));
	expect(idle.map(({ reason }) => reason)).toEqual([]);
});

it('checks 1001 of 1323 rows', () => {
	const isChecked = (row: (typeof ROWS)[number]) => CHECKS.some(({ covers }) => covers(row));
	const checked = ROWS.filter(isChecked).length;
	expect(ROWS).toHaveLength(1323);
	expect(new Set(ROWS.map(({ id }) => id)).size).toBe(1323);
	expect(checked).toBe(1001);
});
