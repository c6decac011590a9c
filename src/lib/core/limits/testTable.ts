import type { Distribution } from '../distributions/summary';
import type { Allowance } from './allowance';
import { testerUncertainty } from './decision/decideRow';
import type { LimitDecision } from './decision/limitDecision';
import { percent, significant, withoutNoise } from './digits';
import type { LimitRow, LimitValue } from './limit';
import type { PolicyVersion } from './policy';
import { DEFAULT_GUARD_BAND } from './testLimit';

export const TEST_TABLE_HEAD = [
	'characteristic',
	'temperature_celsius',
	'frequency_hertz',
	'reverse_voltage_volts',
	'test_low',
	'test_high',
	'unit',
	'printed_minimum',
	'printed_maximum',
	'guard_band_r',
	'guard_band_low',
	'guard_band_high',
	'tester_uncertainty',
	'basis',
	'decided_by',
	'yield_passed',
	'yield_of',
	'yield_predicted_percent',
	'policy',
	'policy_version',
	'trace'
] as const;

/** What a line of the table rests on. */
export interface TestedRow {
	readonly row: LimitRow;
	readonly distribution: Distribution;
	/** Where a person decided the printed limits. */
	readonly decided?: { readonly decision: LimitDecision; readonly by: string } | undefined;
}

/**
 * The limits of the production test, one condition a line, each number as it is printed: what a test
 * programme takes over. Conditions without a test limit have no line.
 */
export function testTable(
	rows: readonly TestedRow[],
	{ rules, number }: Pick<PolicyVersion, 'rules' | 'number'>
): (string | number)[][] {
	return rows.flatMap(({ row, distribution, decided }) => {
		const { condition, minimum, maximum, testYield, unit, unitScale } = row;
		if (minimum?.test === undefined && maximum?.test === undefined) return [];
		const uncertainty = testerUncertainty(decided?.decision, rules, distribution);
		return [
			[
				row.characteristic,
				condition.temperatureCelsius,
				condition.frequency ?? '',
				condition.reverseVoltage ?? '',
				minimum?.test?.text ?? '',
				maximum?.test?.text ?? '',
				unit,
				minimum?.text ?? '',
				maximum?.text ?? '',
				rules.guardBand ?? DEFAULT_GUARD_BAND,
				guardWidth(minimum),
				guardWidth(maximum),
				uncertaintyText(uncertainty, unit, unitScale),
				row.basis,
				decided?.by ?? '',
				testYield?.passed ?? '',
				testYield?.of ?? '',
				testYield === undefined ? '' : significant(testYield.predicted * 100, 4),
				rules.name,
				number,
				row.inputHash
			]
		];
	});
}

/** r·U in the unit of the table, from the steps of the test limit. */
function guardWidth(limit: LimitValue | null): string {
	const [, afterDrift, guarded] = limit?.test?.derivation ?? [];
	return afterDrift?.value == null || guarded?.value == null
		? ''
		: significant(withoutNoise(Math.abs(guarded.value - afterDrift.value)), 4);
}

function uncertaintyText(by: Allowance, unit: string, unitScale: number): string {
	return 'relative' in by
		? percent(by.relative).replace('\u00a0', ' ')
		: `${withoutNoise(by.absolute / unitScale)} ${unit}`;
}
