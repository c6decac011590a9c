import type { VerificationEvidence } from '$lib/core/review/verificationEvidence';

/** A row of the sheet as the page is given it. */
export interface SheetEntry {
	readonly row: string;
	readonly state: 'open' | 'ticked' | 'flagged';
	readonly at: string | null;
	readonly byName: string | null;
	readonly evidence: VerificationEvidence;
	readonly comments: number;
}

export interface SheetGroup {
	readonly title: string;
	readonly conditions: string;
	readonly kind: VerificationEvidence['kind'];
	readonly rows: readonly SheetEntry[];
}

/** The rows under their heads, in the order in which the heads first occur. */
export function groupRows(rows: readonly SheetEntry[]): SheetGroup[] {
	const key = ({ evidence }: SheetEntry) => `${evidence.group}\n${evidence.groupConditions}`;
	return [...new Set(rows.map(key))].map((name) => {
		const members = rows.filter((row) => key(row) === name);
		const [first] = members;
		return {
			title: first?.evidence.group ?? '',
			conditions: first?.evidence.groupConditions ?? '',
			kind: first?.evidence.kind ?? 'text',
			rows: members
		};
	});
}

export interface SheetCounts {
	readonly total: number;
	readonly ticked: number;
	readonly flagged: number;
	readonly open: number;
	/** Open rows that may be ticked as a group. */
	readonly lowRisk: number;
	readonly pending: number;
}

export function countRows(rows: readonly SheetEntry[]): SheetCounts {
	const inState = (state: SheetEntry['state']) => rows.filter((row) => row.state === state).length;
	return {
		total: rows.length,
		ticked: inState('ticked'),
		flagged: inState('flagged'),
		open: inState('open'),
		lowRisk: rows.filter(({ state, evidence }) => state === 'open' && evidence.risk === 'low')
			.length,
		pending: rows.filter(({ evidence }) => evidence.risk === 'pending').length
	};
}

const SIDES = ['minimum', 'typical', 'maximum'] as const;
export type Side = (typeof SIDES)[number];
export const SIDE_WORDS = { minimum: 'min', typical: 'typ', maximum: 'max' } as const;

/** What of the three is printed in this row. */
export function printedSides({ printed }: VerificationEvidence): Side[] {
	return SIDES.filter((side) => printed[side] !== null);
}

/** Tomas Rehak → TR. */
export function initials(name: string): string {
	return name
		.split(/\s+/)
		.map((part) => part.charAt(0).toUpperCase())
		.join('');
}

/** `09:41` of an instant in UTC. */
export function clockTime(instant: string): string {
	return instant.slice(11, 16);
}

/** `2025-02-17 14:05 UTC`. */
export function instantText(instant: string): string {
	return `${instant.slice(0, 10)} ${instant.slice(11, 16)} UTC`;
}

/** `+0.25`, `−2.3`, `0.00`: a percentage with its sign and a typographic minus. */
export function signedPercent(percent: number, decimals: number): string {
	const digits = Math.abs(percent).toFixed(decimals);
	if (Number(digits) === 0) return digits;
	return `${percent < 0 ? '−' : '+'}${digits}`;
}

const decimals = (text: string) => text.split('.')[1]?.length ?? 0;

/** Decimals of a group's printed numbers and of the second route's, so that their points meet. */
export function columnDecimalsOf({ rows }: Pick<SheetGroup, 'rows'>): {
	printed: number;
	second: number;
} {
	const printed = rows.flatMap(({ evidence }) =>
		SIDES.flatMap((side) => [
			evidence.printed[side] ?? '',
			evidence.previous?.values[side]?.text ?? ''
		])
	);
	const second = rows.flatMap(({ evidence }) =>
		evidence.computed?.status === 'done'
			? Object.values(evidence.computed.checks).map((check) => check?.text ?? '')
			: []
	);
	return {
		printed: Math.max(0, ...printed.map(decimals)),
		second: Math.max(0, ...second.map(decimals))
	};
}

/** `132 kB`: bytes in thousands, as file managers say it. */
export function fileSize(bytes: number): string {
	return bytes < 1000 ? `${bytes} B` : `${Math.round(bytes / 1000)} kB`;
}
