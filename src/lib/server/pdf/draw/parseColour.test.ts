import { expect, it } from 'vitest';
import { parseColour, UnknownColourError } from './parseColour';

it.each([
	['#0e6656', [14 / 255, 102 / 255, 86 / 255], 1],
	['#fff', [1, 1, 1], 1],
	['#00000080', [0, 0, 0], 128 / 255],
	['transparent', [0, 0, 0], 0]
])('reads %s', (text, colour, alpha) => {
	expect(parseColour(text)).toEqual({ colour, alpha });
});

it.each(['verdigris', '#12', 'rgb(1, 2, 3)', ''])('refuses “%s”', (text) => {
	expect(() => parseColour(text)).toThrow(UnknownColourError);
});
