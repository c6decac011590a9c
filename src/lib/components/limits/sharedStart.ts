/**
 * What all names begin with, up to and with the last separator: written once before a row of them.
 *
 * @example sharedStart(['LK24-011', 'LK24-014']) // 'LK24-'
 */
export function sharedStart(names: readonly string[]): string {
	const [first] = names;
	if (first === undefined || names.length < 2) return '';
	let length = 0;
	while (length < first.length && names.every((name) => name[length] === first[length])) length++;
	return /^.*[-_/ ]/.exec(first.slice(0, length))?.[0] ?? '';
}
