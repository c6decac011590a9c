import { inEngineeringUnits } from '$lib/core/units/engineering';

const NO_BREAK_SPACE = '\u00a0';
const MINUS = '\u2212';

/** A number with a true minus sign and its unit. */
export const withUnit = (value: number, unit: string) =>
	`${String(value).replace('-', MINUS)}${NO_BREAK_SPACE}${unit}`;

/** A frequency as instruments show it: `1 MHz`, `470 kHz`. */
export function frequencyText(hertz: number): string {
	const figures = Math.max(1, String(Number(hertz.toPrecision(6))).replace(/\.|0+$/g, '').length);
	return inEngineeringUnits(hertz, 'Hz', Math.min(6, figures));
}

/** Bytes in the unit a person reads: `422 kB`. */
export function sizeText(bytes: number): string {
	if (bytes < 1000) return withUnit(bytes, 'B');
	return bytes < 1e6
		? withUnit(Math.round(bytes / 1e3), 'kB')
		: withUnit(Number((bytes / 1e6).toPrecision(3)), 'MB');
}

/** Many, with thousands apart: `3,300,000`. */
export const manyText = (count: number) => count.toLocaleString('en');

/** An instant to the minute, in UTC: `2026-02-14 10:21 UTC`. */
export const instantText = (at: string) => `${at.slice(0, 10)} ${at.slice(11, 16)} UTC`;

/** Names up to a readable length, the rest counted. */
export function namesText(names: readonly string[], most = 4): string {
	const shown = names.slice(0, most).join(', ');
	return names.length > most ? `${shown} and ${names.length - most} more` : shown;
}
