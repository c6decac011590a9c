import { limitMessages } from '../messages/limits';
import type { LimitRow } from './limit';

const COLUMNS = ['minimum', 'typical', 'maximum'] as const;

/**
 * Looks over a finished C(V) table: no column may rise with the reverse bias, since a depletion
 * layer only widens. Each row was computed on its own, so devices absent at one bias can do it.
 *
 * @returns the rows in the order given, with the findings among their warnings
 */
export function checkTable(rows: readonly LimitRow[]): LimitRow[] {
	const byBias = rows
		.filter((row) => row.condition.reverseVoltage !== undefined)
		.sort((a, b) => biasOf(a) - biasOf(b));
	const findings = new Map<LimitRow, string[]>();
	for (const column of COLUMNS) {
		let before: LimitRow | undefined;
		for (const row of byBias) {
			const value = row[column];
			if (value === null) continue;
			const last = before?.[column];
			if (before !== undefined && last && value.printed > last.printed) {
				const found = limitMessages.rises(
					column,
					biasOf(row),
					value.text,
					biasOf(before),
					last.text
				);
				findings.set(row, [...(findings.get(row) ?? []), found]);
			}
			before = row;
		}
	}
	return rows.map((row) => ({ ...row, warnings: [...row.warnings, ...(findings.get(row) ?? [])] }));
}

function biasOf(row: LimitRow): number {
	return row.condition.reverseVoltage ?? Number.NaN;
}
