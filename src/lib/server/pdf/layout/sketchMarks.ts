import type { Sketch, SketchText, Shade } from '../../../plot/sketch';
import type { Face } from '../fonts/faces';
import type { Colour, DrawnMark } from './drawnMark';

/** Ink and paper; the tint of pads is 21 % black. */
const SHADES: Readonly<Record<Shade, Colour>> = {
	ink: [0, 0, 0],
	paper: [1, 1, 1],
	tint: [0.79, 0.79, 0.79]
};

const FACES: Readonly<Record<SketchText['style'], Face>> = {
	upright: 'sans',
	italic: 'sansItalic',
	bold: 'sansBold'
};

/** A line drawing as marks of a page: vectors, and text as text. */
export function sketchMarks({ marks }: Sketch): DrawnMark[] {
	return marks.map((mark): DrawnMark => {
		switch (mark.kind) {
			case 'path':
				return {
					kind: 'path',
					steps: mark.steps,
					fill: mark.fill === null ? null : SHADES[mark.fill],
					stroke:
						mark.stroke === null ? null : { colour: SHADES.ink, ...mark.stroke, cap: 0, join: 0 }
				};
			case 'text':
				return {
					kind: 'text',
					text: mark.text,
					face: FACES[mark.style],
					size: mark.size,
					colour: SHADES.ink,
					at: mark.at,
					angle: 0
				};
			default:
				return mark satisfies never;
		}
	});
}
