import { z } from 'zod';
import { readNumber } from '$lib/core/units/readNumber';

/** A number somebody types: with a point or one decimal comma; `undefined` for anything else. */
export function typedNumber(text: string): number | undefined {
	return readNumber(text) ?? readNumber(text, ',');
}

/**
 * A field that holds a number as it was typed. It stays text, so that an error gives back exactly
 * what was there; the action reads it by `typedNumber`.
 */
export const decimalField = (isFine: (value: number) => boolean, message: string) =>
	z
		.string()
		.trim()
		.refine((text) => {
			const value = typedNumber(text);
			return value !== undefined && isFine(value);
		}, message);
