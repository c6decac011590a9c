const PREFIXES: Readonly<Record<string, number>> = {
	p: 1e-12,
	n: 1e-9,
	µ: 1e-6,
	m: 1e-3,
	k: 1e3,
	M: 1e6,
	G: 1e9
};

const PREFIXED = /^([pnµmkMG])(?:V|A|W|F|H|Hz|Ω|s|J|C|V\/µs)$/;

/** How large a unit is in SI: 1e-3 for mW. Degrees Celsius and bare units are 1. */
export function unitScaleOf(unit: string): number {
	const [, prefix] = PREFIXED.exec(unit) ?? [];
	return prefix === undefined ? 1 : (PREFIXES[prefix] ?? 1);
}
