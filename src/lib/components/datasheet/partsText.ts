import type { PrintedTexts } from '$lib/core/datasheet/resolveInput';

const WORDS = { minimum: 'min', typical: 'typ', maximum: 'max' } as const;
const PARTS = ['minimum', 'typical', 'maximum'] as const;

/** `10.9 / 11.8 / 12.7 pF`, or with words where one is missing: `typ 11.8 pF`. */
export function partsText(of: PrintedTexts): string {
	const there = PARTS.flatMap((part) => {
		const text = of[part];
		return text === null ? [] : [{ part, text }];
	});
	const numbers =
		there.length === PARTS.length
			? there.map(({ text }) => text).join(' / ')
			: there.map(({ part, text }) => `${WORDS[part]} ${text}`).join(', ');
	return `${numbers}\u00a0${of.unit}`;
}
