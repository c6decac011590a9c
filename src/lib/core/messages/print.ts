/** `“字” (U+5B57)`: a character by its shape and its number. */
const named = (character: string) =>
	`“${character}” (U+${(character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0')})`;

export const charactersNotInFaces = (characters: readonly string[]) =>
	`The faces of the printed sheet have no ${characters.map(named).join(', ')}.`;
