import { z } from 'zod';
import type { Row } from './rows';

/** How Platen computes the rows it speaks of. */
export interface Check {
	readonly name: string;
	readonly covers: (row: Row) => boolean;
	readonly value: (row: Row) => number;
}

/** Rows that Platen does not compute, and why. */
export interface Outside {
	readonly reason: string;
	readonly covers: (row: Row) => boolean;
}

/** Rows of an area whose quantity begins like this. */
export const quantity =
	(area: string, ...beginnings: readonly string[]) =>
	(row: Row): boolean =>
		row.area === area && beginnings.some((text) => row.quantity.startsWith(text));

/** Rows whose identifier matches. */
export const identifier =
	(pattern: RegExp) =>
	(row: Row): boolean =>
		pattern.test(row.id);

/** What is wrong with a computed value, or nothing. */
export function deviation(row: Row, value: number): string | undefined {
	const expected = z.number().parse(row.expected);
	const { abs, rel } = z
		.object({ abs: z.number().optional(), rel: z.number().optional() })
		.parse(row.tolerance);
	const allowed = abs ?? (rel ?? 0) * Math.abs(expected);
	const error = Math.abs(value - expected);
	if (error <= allowed) return undefined;
	return `${row.id}: ${value} against ${expected} ± ${allowed} (${row.source})`;
}
