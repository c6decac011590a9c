import { expect, it } from 'vitest';
import { limitMessages } from '../messages/limits';
import { checkTable } from './checkTable';
import { computeLimitRow } from './computeLimitRow';
import type { LimitRow } from './limit';
import { AT_FOUR_VOLTS, PLAIN_POLICY, withValues } from './limitTestData';

function rowAt(reverseVoltage: number, median: number): LimitRow {
	const lots = [-1, 0, 1].map((lot) => [-2, 0, 2].map((y) => median * Math.exp((lot + y) / 200)));
	return computeLimitRow(withValues(lots), PLAIN_POLICY, {
		...AT_FOUR_VOLTS,
		condition: { temperatureCelsius: 25, reverseVoltage }
	});
}

it('finds nothing in a column that falls', () => {
	const rows = [rowAt(0, 40), rowAt(4, 14), rowAt(28, 2)];
	expect(checkTable(rows)).toEqual(rows);
});

it('warns where a column rises with the bias, whatever the order of the rows', () => {
	const [low, high] = [rowAt(1, 30), rowAt(2, 31)];
	const [second, first] = checkTable([high, low]);
	expect(first?.warnings).toEqual(low.warnings);
	expect(second?.warnings).toEqual([
		...high.warnings,
		...(['minimum', 'typical', 'maximum'] as const).map((column) =>
			limitMessages.rises(column, 2, high[column]?.text ?? '', 1, low[column]?.text ?? '')
		)
	]);
});

it('looks over rows without a limit', () => {
	const refused = { ...rowAt(2, 20), minimum: null, maximum: null };
	const [, , last] = checkTable([rowAt(1, 30), refused, rowAt(3, 31)]);
	expect(last?.warnings.filter((warning) => warning.startsWith('The minimum'))).toHaveLength(1);
});
