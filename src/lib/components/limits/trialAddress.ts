import { WHAT_IF_FIELDS } from '$lib/core/limits/whatIf/readWhatIf';
import type { WhatIfAnswer, WhatIfAnswerRow } from '$lib/core/limits/whatIf/whatIfAnswer';

const isTrial = (name: string) => (WHAT_IF_FIELDS as readonly string[]).includes(name);

/** The parameters of an address that speak of a trial, as text; empty without one. */
export function trialSearch(url: URL): string {
	const own = [...url.searchParams].filter(([name]) => isTrial(name));
	return new URLSearchParams(own).toString();
}

/** The other parameters: what a form of the trial keeps. */
export function keptParameters(url: URL): { name: string; value: string }[] {
	return [...url.searchParams]
		.filter(([name]) => !isTrial(name))
		.map(([name, value]) => ({ name, value }));
}

/** The address with another trial, so that links keep what is being tried. */
export function withTrial(url: URL, trial: string): URL {
	const next = new URL(url);
	const parameters = [
		...keptParameters(url).map(({ name, value }): [string, string] => [name, value]),
		...new URLSearchParams(trial)
	];
	next.search = new URLSearchParams(parameters).toString();
	return next;
}

/** Path and parameters without a trial. */
export function withoutTrial(url: URL): string {
	const { pathname, search } = withTrial(url, '');
	return `${pathname}${search}`;
}

/** The rows of a trial by the key of their condition. */
export function triedRows(answer: WhatIfAnswer): ReadonlyMap<string, WhatIfAnswerRow> {
	return new Map(answer.rows.map((row) => [row.key, row]));
}
