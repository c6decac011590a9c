/**
 * Advance widths of Source Sans 3 in thousandths of the size, characters U+0020 to U+007E; read from
 * the font's `hmtx` table. Enough to stand labels side by side without measuring on a screen.
 */
const REGULAR = [
	200, 289, 426, 497, 497, 824, 609, 249, 303, 303, 418, 497, 249, 311, 249, 350, 497, 497, 497,
	497, 497, 497, 497, 497, 497, 497, 249, 249, 497, 497, 497, 425, 847, 543, 588, 571, 615, 527,
	494, 617, 652, 263, 479, 579, 486, 727, 647, 664, 566, 664, 569, 534, 536, 645, 515, 786, 513,
	476, 539, 303, 350, 303, 497, 500, 542, 504, 553, 456, 555, 496, 292, 504, 544, 246, 247, 495,
	255, 829, 547, 542, 555, 555, 347, 419, 338, 544, 467, 719, 446, 467, 425, 303, 241, 303, 497
] as const;

const ITALIC = [
	200, 282, 407, 479, 480, 791, 582, 242, 291, 293, 403, 480, 242, 299, 242, 340, 479, 480, 480,
	480, 480, 480, 480, 480, 480, 480, 242, 242, 480, 480, 480, 409, 814, 510, 569, 550, 594, 502,
	473, 588, 623, 249, 456, 555, 462, 705, 619, 633, 550, 633, 555, 506, 510, 616, 496, 756, 490,
	461, 512, 292, 340, 292, 479, 483, 517, 536, 536, 435, 535, 480, 282, 530, 523, 237, 238, 476,
	248, 799, 525, 514, 535, 534, 342, 402, 324, 522, 448, 707, 429, 448, 410, 290, 231, 293, 480
] as const;

/** Digits, signs and most letters outside the table are about half the size wide. */
const OTHER = 497;

/** Width of a line of Source Sans 3 at a size, in the unit of the size; kerning is left out. */
export function textWidth(text: string, size: number, style: 'upright' | 'italic' = 'upright') {
	const advances = style === 'italic' ? ITALIC : REGULAR;
	const thousandths = [...text].reduce(
		(sum, character) => sum + (advances[(character.codePointAt(0) ?? 0) - 0x20] ?? OTHER),
		0
	);
	return (thousandths * size) / 1000;
}
