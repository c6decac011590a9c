import type { VerificationEvidence } from './verificationEvidence';

export interface CsvRow {
	readonly state: string;
	readonly byName: string | null;
	readonly at: string | null;
	readonly evidence: VerificationEvidence;
}

const HEAD = [
	'group',
	'row',
	'unit',
	'value',
	'printed',
	'second_route',
	'deviation_percent',
	'devices_outside',
	'devices_allowed',
	'previous_release',
	'previous_value',
	'change',
	'risk',
	'state',
	'by',
	'at',
	'note'
];

const SIDES = ['minimum', 'typical', 'maximum'] as const;

/** The verification sheet as comma-separated values (RFC 4180), one line a printed value. */
export function sheetCsv(rows: readonly CsvRow[]): string {
	const lines = rows.flatMap(linesOf);
	return [HEAD, ...lines].map((line) => `${line.map(quoted).join(',')}\r\n`).join('');
}

function linesOf({ state, byName, at, evidence }: CsvRow): string[][] {
	const common = [evidence.group, evidence.label, evidence.unit];
	const end = [evidence.risk, state, byName ?? '', at ?? '', evidence.note];
	const sides = SIDES.filter((side) => evidence.printed[side] !== null);
	if (sides.length === 0) return [[...common, '', '', '', '', '', '', '', '', '', ...end]];
	return sides.map((side) => {
		const done = evidence.computed?.status === 'done' ? evidence.computed : null;
		const check = done?.checks[side] ?? null;
		const outside = side === 'typical' ? null : (done?.outside[side] ?? null);
		return [
			...common,
			side,
			ascii(evidence.printed[side]),
			check?.text ?? '',
			check === null ? '' : check.deviationPercent.toFixed(4),
			outside === null ? '' : String(outside.count),
			outside === null ? '' : String(outside.allowed),
			evidence.previous?.version ?? '',
			ascii(evidence.previous?.values[side]?.text ?? null),
			evidence.previous?.changes[side] ?? '',
			...end
		];
	});
}

function ascii(text: string | null): string {
	return text?.replace('\u2212', '-') ?? '';
}

/** Quoted where needed; what a spreadsheet would run as a formula is kept as text. */
function quoted(field: string): string {
	const safe = /^[=@]/.test(field) ? `'${field}` : field;
	return /[",\r\n]/.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}
