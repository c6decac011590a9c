/** A character for a message: itself and its code point, `“☃” (U+2603)`. */
export function nameCharacter(character: string): string {
	const codePoint = (character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0');
	return `“${character}” (U+${codePoint})`;
}
