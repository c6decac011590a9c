import type { Basis } from '$lib/core/limits/basis';
import type { LimitRow } from '$lib/core/limits/limit';
import type { Side } from '$lib/core/limits/allowance';

/** A limit row as a page shows it: the printed digits, without the derivations. */
export interface GridRow {
	readonly key: string;
	/** Reverse bias in V. */
	readonly bias: number;
	readonly minimum: string | null;
	readonly typical: string | null;
	readonly maximum: string | null;
	readonly basis: Basis;
	readonly sampleSize: number;
	readonly independentLots: number;
	readonly refusals: readonly string[];
	readonly warnings: readonly string[];
}

/** The same with the spread that the stored sums show, relative, in %. */
export interface CurveGridRow extends GridRow {
	readonly betweenPercent: number | null;
	readonly withinPercent: number | null;
}

export function gridRow(row: LimitRow): GridRow {
	return {
		key: row.conditionKey,
		bias: row.condition.reverseVoltage ?? 0,
		minimum: row.minimum?.text ?? null,
		typical: row.typical?.text ?? null,
		maximum: row.maximum?.text ?? null,
		basis: row.basis,
		sampleSize: row.sampleSize,
		independentLots: row.independentLots,
		refusals: row.refusals,
		warnings: row.warnings
	};
}

/** Which of a row's numbers a derivation is of. */
export type Shown = Side | 'typical';
export const SHOWN = ['minimum', 'typical', 'maximum'] as const satisfies readonly Shown[];
export const SHORT = { minimum: 'min', typical: 'typ', maximum: 'max' } as const satisfies Record<
	Shown,
	string
>;

/** The page's address with these parameters set, and those that are `null` left out. */
export function addressWith(
	url: URL,
	change: Readonly<Record<string, string | number | null>>
): string {
	const search = new URLSearchParams(url.searchParams);
	for (const [name, value] of Object.entries(change)) {
		if (value === null) search.delete(name);
		else search.set(name, String(value));
	}
	const text = search.toString();
	return text === '' ? url.pathname : `${url.pathname}?${text}`;
}

/** A number of V or °C as it is set, with a true minus. */
export function signedText(value: number): string {
	return String(value).replace('-', '\u2212');
}

/** `1 MHz`, `100 kHz`. */
export function frequencyText(hertz: number): string {
	const [scale, unit] = hertz >= 1e6 ? [1e6, 'MHz'] : hertz >= 1e3 ? [1e3, 'kHz'] : [1, 'Hz'];
	return `${hertz / scale}\u00a0${unit}`;
}

/** What a group of rows rests on: `300 devices, 3 lots`, or from the least to the most. */
export function sampleText(rows: readonly GridRow[]): string {
	const measured = rows.filter((row) => row.sampleSize > 0);
	const range = (numbers: readonly number[], one: string) => {
		const [least, most] = [Math.min(...numbers), Math.max(...numbers)];
		const count = least === most ? String(least) : `${least} to ${most}`;
		return `${count} ${most === 1 ? one : `${one}s`}`;
	};
	if (measured.length === 0) return 'not measured';
	return [
		range(
			measured.map((row) => row.sampleSize),
			'device'
		),
		range(
			measured.map((row) => row.independentLots),
			'lot'
		)
	].join(', ');
}
