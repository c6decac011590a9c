/** A number before its unit, the `=` of a condition, or a standard before its number. */
const BOUND = [
	/(?<=\d) (?=(?:[fpnµmkMG]?(?:V|A|F|Hz|W|Ω|H|s|m|K)|°C|%)(?![A-Za-z]))/g,
	/(?<=[=≤≥]) (?=[\d+\u2212])/g,
	/(?<=\b(?:IEC|ISO|Fig\.|MIL|JEDEC)) (?=\d)/g
] as const;

/** Holds together on a line what is read together: `50 MHz`, `= 4 V`, `IEC 60134`. */
export const bindUnits = (text: string) =>
	BOUND.reduce((bound, pattern) => bound.replaceAll(pattern, '\u00a0'), text);
