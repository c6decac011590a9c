import { PDFHexString } from 'pdf-lib';
import type { Box, DiscBox, Ink, RectangleBox, RuleBox, Tag, TextBox } from '../layout/box';
import type { Colour, DrawnMark, PathStep } from '../layout/drawnMark';
import { decimal } from './decimal';
import type { FontBook } from './FontBook';

/** Inks as operators: grey rules are 60 % black, verdigris is #0E6656. */
const INKS: Record<Ink, Colour> = {
	black: [0, 0, 0],
	grey: [0.4, 0.4, 0.4],
	verdigris: [14 / 255, 102 / 255, 86 / 255],
	white: [1, 1, 1]
};

/** A stretch of a page's content that belongs to a node of the tag tree. */
export interface MarkedContent {
	readonly node: number;
	readonly id: number;
	/** A symbol: a part of the node with a reading of its own, `V_R`. */
	readonly actual: string | null;
}

/** Turns boxes into the operators of one page. Places are given from above, PDF counts from below. */
export class PageWriter {
	readonly #height: number;
	readonly #fonts: FontBook;
	readonly #operators: string[] = [];
	readonly #marked: MarkedContent[] = [];
	/** Ink and font in force, so that they are only written when they change. */
	#fill = '';
	#font = '';

	constructor(height: number, fonts: FontBook) {
		this.#height = height;
		this.#fonts = fonts;
	}

	/** Writes boxes in order; neighbours of one tag share one stretch of marked content. */
	write(boxes: readonly Box[], roleOf: (node: number) => string): void {
		let open: string | null = null;
		for (const box of boxes) {
			const actual = box.kind === 'text' ? (box.actual ?? null) : null;
			const stretch = `${box.tag} ${actual ?? ''}`;
			// Two equal symbols side by side are two symbols.
			if (stretch !== open || (actual !== null && box.tag !== null)) {
				if (open !== null) this.#add('EMC');
				this.#add(this.#begin(box.tag, box.tag === null ? null : actual, roleOf));
				open = stretch;
			}
			this.#box(box);
		}
		if (open !== null) this.#add('EMC');
	}

	get content(): string {
		return this.#operators.join('\n');
	}

	/** In the order of their ids. */
	get marked(): readonly MarkedContent[] {
		return this.#marked;
	}

	#begin(tag: Tag, actual: string | null, roleOf: (node: number) => string): string {
		if (tag === null) return '/Artifact BMC';
		const id = this.#marked.length;
		this.#marked.push({ node: tag, id, actual });
		return actual === null
			? `/${roleOf(tag)} <</MCID ${id}>> BDC`
			: `/Span <</MCID ${id} /ActualText ${PDFHexString.fromText(actual).toString()}>> BDC`;
	}

	#add(...operators: string[]) {
		this.#operators.push(...operators);
	}

	#setFill(colour: Colour) {
		const fill = `${paint(colour)} rg`;
		if (fill !== this.#fill) this.#add(fill);
		this.#fill = fill;
	}

	#setFont(name: string, size: number) {
		const font = `/${name} ${decimal(size)} Tf`;
		if (font !== this.#font) this.#add(font);
		this.#font = font;
	}

	/** Ends a saved state: what was in force before it is in force again, and no longer known here. */
	#restore() {
		this.#add('Q');
		this.#fill = '';
		this.#font = '';
	}

	#box(box: Box): void {
		switch (box.kind) {
			case 'text':
				return this.#text(box);
			case 'rule':
				return this.#rule(box);
			case 'rectangle':
				return this.#rectangle(box);
			case 'disc':
				return this.#disc(box);
			case 'drawing':
				this.#add('q', `1 0 0 1 ${this.#point(box.x, box.y)} cm`);
				box.marks.forEach((mark) => this.#mark(mark));
				this.#restore();
				return;
			default:
				return box satisfies never;
		}
	}

	#point(x: number, y: number): string {
		return `${decimal(x)} ${decimal(this.#height - y)}`;
	}

	#text(box: TextBox): void {
		this.#setFill(INKS[box.ink ?? 'black']);
		this.#add('BT');
		let along = 0;
		for (const piece of box.pieces) {
			const { name, operand } = this.#fonts.encode(piece.face, piece.text, piece.kerning);
			const rise = piece.rise ?? 0;
			const matrix = box.turned
				? `0 -1 1 0 ${this.#point(box.x + rise, box.y + along)}`
				: `1 0 0 1 ${this.#point(box.x + along, box.y - rise)}`;
			this.#setFont(name, piece.size);
			if (piece.tracking) this.#add(`${decimal(piece.tracking)} Tc`);
			this.#add(`${matrix} Tm`, `${operand} TJ`);
			if (piece.tracking) this.#add('0 Tc');
			along += piece.width + (piece.after ?? 0);
		}
		this.#add('ET');
	}

	#rule(box: RuleBox): void {
		this.#add(
			`${paint(INKS[box.ink ?? 'black'])} RG ${decimal(box.weight)} w ${dashes(box.dash)}`,
			`${this.#point(...box.from)} m ${this.#point(...box.to)} l S`
		);
	}

	#rectangle(box: RectangleBox): void {
		const place = `${this.#point(box.x, box.y + box.height)} ${decimal(box.width)} ${decimal(box.height)} re`;
		if (box.fill) {
			this.#setFill(INKS[box.fill]);
			this.#add(`${place} f`);
		}
		if (box.stroke)
			this.#add(
				`${paint(INKS[box.stroke])} RG ${decimal(box.weight ?? 0.5)} w ${dashes(box.dash)}`,
				`${place} S`
			);
	}

	/** Full disc, left half filled, ring, or dashed ring; the outline lies inside the radius. */
	#disc(box: DiscBox): void {
		const weight = 0.7;
		const radius = box.radius - weight / 2;
		const steps = circle(box.radius, box.look === 'half' ? 0.5 : 1);
		this.#add('q', `1 0 0 1 ${this.#point(box.x, box.y)} cm`, '0 0 0 rg 0 0 0 RG');
		if (box.look === 'full' || box.look === 'half') this.#add(path(steps), 'f');
		if (box.look !== 'full')
			this.#add(
				`${weight} w ${dashes(box.look === 'dashed ring' ? [1.1, 1.1] : undefined)}`,
				path(circle(radius, 1)),
				's'
			);
		this.#restore();
	}

	#mark(mark: DrawnMark): void {
		switch (mark.kind) {
			case 'path':
				if (mark.fill) {
					this.#setFill(mark.fill);
					this.#add(path(mark.steps), 'f');
				}
				if (mark.stroke)
					this.#add(
						`${paint(mark.stroke.colour)} RG ${decimal(mark.stroke.width)} w ${mark.stroke.cap} J ${mark.stroke.join} j ${dashes(mark.stroke.dash)}`,
						path(mark.steps),
						'S'
					);
				return;
			case 'text': {
				const { name, operand } = this.#fonts.encode(mark.face, mark.text);
				const angle = (mark.angle * Math.PI) / 180;
				const [cosine, sine] = [Math.cos(angle), Math.sin(angle)];
				this.#setFill(mark.colour);
				this.#setFont(name, mark.size);
				this.#add(
					'BT',
					`${[cosine, sine, -sine, cosine, mark.at[0], -mark.at[1]].map(decimal).join(' ')} Tm`,
					`${operand} TJ ET`
				);
				return;
			}
			case 'clip':
				this.#add('q', path(mark.steps), 'W n');
				return;
			case 'restore':
				this.#restore();
				return;
			default:
				return mark satisfies never;
		}
	}
}

const paint = (colour: Colour) => colour.map(decimal).join(' ');

const dashes = (dash: readonly number[] | undefined) =>
	`[${(dash ?? []).map(decimal).join(' ')}] 0 d`;

/** Path operators of steps given from above; the origin is the drawing's upper left corner. */
function path(steps: readonly PathStep[]): string {
	const point = ([x, y]: readonly [number, number]) => `${decimal(x)} ${decimal(-y)}`;
	return steps
		.map((step) => {
			switch (step.to) {
				case 'move':
					return `${point(step.at)} m`;
				case 'line':
					return `${point(step.at)} l`;
				case 'curve':
					return `${point(step.by)} ${point(step.then)} ${point(step.at)} c`;
				case 'close':
					return 'h';
				default:
					return step satisfies never;
			}
		})
		.join('\n');
}

/** A circle about the origin, or its left half. */
function circle(radius: number, share: 1 | 0.5): PathStep[] {
	const handle = 0.5523 * radius;
	const left: PathStep[] = [
		{ to: 'move', at: [0, -radius] },
		{ to: 'curve', by: [-handle, -radius], then: [-radius, -handle], at: [-radius, 0] },
		{ to: 'curve', by: [-radius, handle], then: [-handle, radius], at: [0, radius] }
	];
	if (share === 0.5) return [...left, { to: 'close' }];
	return [
		...left,
		{ to: 'curve', by: [handle, radius], then: [radius, handle], at: [radius, 0] },
		{ to: 'curve', by: [radius, -handle], then: [handle, -radius], at: [0, -radius] },
		{ to: 'close' }
	];
}
