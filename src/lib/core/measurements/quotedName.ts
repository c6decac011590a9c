/** A name as a field of an exported line. */
export function quotedName(name: string): string {
	return /[",\r\n]|^\s|\s$/.test(name) ? `"${name.replaceAll('"', '""')}"` : name;
}
