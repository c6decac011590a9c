import type { Colour } from '../layout/drawnMark';

/** A colour of a chart specification that isn't one of the forms the themes use. */
export class UnknownColourError extends Error {
	override readonly name = 'UnknownColourError';
	constructor(readonly colour: string) {
		super(`colour of a printed chart requires #rrggbb or transparent, got ${colour}`);
	}
}

const NAMED: Readonly<Record<string, string>> = {
	black: '#000000',
	white: '#ffffff',
	transparent: '#00000000'
};

/**
 * Red, green and blue of `#rgb`, `#rrggbb` or `#rrggbbaa`, each 0 to 1.
 *
 * @throws {UnknownColourError} for anything else
 */
export function parseColour(text: string): { colour: Colour; alpha: number } {
	const hex = NAMED[text] ?? text;
	const long = /^#[0-9a-f]{3}$/i.test(hex) ? hex.replaceAll(/[0-9a-f]/gi, '$&$&') : hex;
	const [, red, green, blue, alpha = 'ff'] =
		/^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})?$/i.exec(long) ?? [];
	if (red === undefined || green === undefined || blue === undefined)
		throw new UnknownColourError(text);
	const part = (digits: string) => Number.parseInt(digits, 16) / 255;
	return { colour: [part(red), part(green), part(blue)], alpha: part(alpha) };
}
