import { measureText } from '../fonts/shapeText';
import type { Face } from '../fonts/faces';
import type { Colour, DrawnMark, PathStep } from '../layout/drawnMark';
import { parseColour } from './parseColour';

type Matrix = readonly [number, number, number, number, number, number];
type Point = readonly [number, number];

interface State {
	matrix: Matrix;
	fillStyle: string;
	strokeStyle: string;
	lineWidth: number;
	lineCap: 'butt' | 'round' | 'square';
	lineJoin: 'miter' | 'round' | 'bevel';
	dash: readonly number[];
	globalAlpha: number;
	font: string;
	textAlign: string;
	clips: number;
}

const CAPS = { butt: 0, round: 1, square: 2 } as const;
const JOINS = { miter: 0, round: 1, bevel: 2 } as const;
const HALF_TURN = Math.PI;

/**
 * The part of a canvas context that Vega's canvas renderer uses, writing down what is painted
 * instead of painting it. Points are transformed as the path is built, so that the marks stand in
 * the drawing's own coordinates: pt from its upper left corner.
 */
export class RecordingContext {
	readonly marks: DrawnMark[] = [];
	pixelRatio = 1;
	miterLimit = 10;
	textBaseline = 'alphabetic';
	lineDashOffset = 0;
	globalCompositeOperation = 'source-over';

	#steps: PathStep[] = [];
	#at: Point = [0, 0];
	readonly #saved: State[] = [];
	#state: State = {
		matrix: [1, 0, 0, 1, 0, 0],
		fillStyle: '#000000',
		strokeStyle: '#000000',
		lineWidth: 1,
		lineCap: 'butt',
		lineJoin: 'miter',
		dash: [],
		globalAlpha: 1,
		font: '10px sans-serif',
		textAlign: 'left',
		clips: 0
	};

	set fillStyle(value: string) {
		this.#state.fillStyle = value;
	}
	set strokeStyle(value: string) {
		this.#state.strokeStyle = value;
	}
	set lineWidth(value: number) {
		this.#state.lineWidth = value;
	}
	set lineCap(value: State['lineCap']) {
		this.#state.lineCap = value;
	}
	set lineJoin(value: State['lineJoin']) {
		this.#state.lineJoin = value;
	}
	set globalAlpha(value: number) {
		this.#state.globalAlpha = value;
	}
	set font(value: string) {
		this.#state.font = value;
	}
	set textAlign(value: string) {
		this.#state.textAlign = value;
	}

	setLineDash(dash: readonly number[]) {
		this.#state.dash = [...dash];
	}
	save() {
		this.#saved.push(this.#state);
		this.#state = { ...this.#state, clips: 0 };
	}
	restore() {
		for (let open = this.#state.clips; open > 0; open--) this.marks.push({ kind: 'restore' });
		const saved = this.#saved.pop();
		if (saved) this.#state = saved;
	}

	scale(x: number, y: number) {
		this.#transform([x, 0, 0, y, 0, 0]);
	}
	translate(x: number, y: number) {
		this.#transform([1, 0, 0, 1, x, y]);
	}
	rotate(angle: number) {
		const [cosine, sine] = [Math.cos(angle), Math.sin(angle)];
		this.#transform([cosine, sine, -sine, cosine, 0, 0]);
	}
	#transform([a, b, c, d, e, f]: Matrix) {
		const [A, B, C, D, E, F] = this.#state.matrix;
		this.#state.matrix = [
			A * a + C * b,
			B * a + D * b,
			A * c + C * d,
			B * c + D * d,
			A * e + C * f + E,
			B * e + D * f + F
		];
	}
	#place(x: number, y: number): Point {
		const [a, b, c, d, e, f] = this.#state.matrix;
		return [a * x + c * y + e, b * x + d * y + f];
	}

	beginPath() {
		this.#steps = [];
	}
	moveTo(x: number, y: number) {
		this.#at = [x, y];
		this.#steps.push({ to: 'move', at: this.#place(x, y) });
	}
	lineTo(x: number, y: number) {
		this.#at = [x, y];
		this.#steps.push({ to: this.#steps.length === 0 ? 'move' : 'line', at: this.#place(x, y) });
	}
	bezierCurveTo(bx: number, by: number, tx: number, ty: number, x: number, y: number) {
		this.#at = [x, y];
		this.#steps.push({
			to: 'curve',
			by: this.#place(bx, by),
			then: this.#place(tx, ty),
			at: this.#place(x, y)
		});
	}
	quadraticCurveTo(cx: number, cy: number, x: number, y: number) {
		const [px, py] = this.#at;
		const third = (from: number, control: number) => from + (2 / 3) * (control - from);
		this.bezierCurveTo(third(px, cx), third(py, cy), third(x, cx), third(y, cy), x, y);
	}
	closePath() {
		this.#steps.push({ to: 'close' });
	}
	rect(x: number, y: number, width: number, height: number) {
		this.moveTo(x, y);
		this.lineTo(x + width, y);
		this.lineTo(x + width, y + height);
		this.lineTo(x, y + height);
		this.closePath();
	}
	/** An arc as cubic curves of at most a quarter turn; error below 0.03 % of the radius. */
	arc(x: number, y: number, radius: number, from: number, to: number, isBack = false) {
		let sweep = to - from;
		if (isBack && sweep > 0) sweep -= 2 * HALF_TURN;
		if (!isBack && sweep < 0) sweep += 2 * HALF_TURN;
		const parts = Math.max(1, Math.ceil(Math.abs(sweep) / (HALF_TURN / 2) - 1e-9));
		const step = sweep / parts;
		const handle = (4 / 3) * Math.tan(step / 4) * radius;
		const point = (angle: number): Point => [
			x + radius * Math.cos(angle),
			y + radius * Math.sin(angle)
		];
		const start = point(from);
		if (this.#steps.length === 0) this.moveTo(...start);
		else this.lineTo(...start);
		for (let part = 0; part < parts; part++) {
			const [a, b] = [from + part * step, from + (part + 1) * step];
			const [p, q] = [point(a), point(b)];
			this.bezierCurveTo(
				p[0] - handle * Math.sin(a),
				p[1] + handle * Math.cos(a),
				q[0] + handle * Math.sin(b),
				q[1] - handle * Math.cos(b),
				...q
			);
		}
	}

	fill() {
		const fill = this.#colour(this.#state.fillStyle);
		if (fill) this.marks.push({ kind: 'path', steps: this.#steps, fill, stroke: null });
	}
	stroke() {
		const colour = this.#colour(this.#state.strokeStyle);
		const { lineWidth, dash, lineCap, lineJoin } = this.#state;
		if (!colour || lineWidth <= 0) return;
		const stroke = { colour, width: lineWidth, dash, cap: CAPS[lineCap], join: JOINS[lineJoin] };
		this.marks.push({ kind: 'path', steps: this.#steps, fill: null, stroke });
	}
	clip() {
		this.marks.push({ kind: 'clip', steps: this.#steps });
		this.#state.clips += 1;
	}
	fillRect(x: number, y: number, width: number, height: number) {
		this.beginPath();
		this.rect(x, y, width, height);
		this.fill();
	}
	clearRect() {
		this.beginPath();
	}

	fillText(text: string, x: number, y: number) {
		const colour = this.#colour(this.#state.fillStyle);
		if (!colour || text.trim() === '') return;
		const { face, size } = parseFont(this.#state.font);
		const width = measureText(text, { face, size });
		const share = { center: 0.5, right: 1, end: 1 }[this.#state.textAlign] ?? 0;
		const [a, b] = this.#state.matrix;
		this.marks.push({
			kind: 'text',
			text,
			face,
			size,
			colour,
			at: this.#place(x - width * share, y),
			angle: -Math.round((Math.atan2(b, a) * 180) / HALF_TURN)
		});
	}
	measureText(text: string) {
		return { width: measureText(text, parseFont(this.#state.font)) };
	}

	/** Paint as it looks on white paper; `null` when it can't be seen. */
	#colour(style: string): Colour | null {
		const parsed = parseColour(style);
		const alpha = parsed.alpha * this.#state.globalAlpha;
		if (alpha === 0) return null;
		const [red, green, blue] = parsed.colour;
		const over = (part: number) => part * alpha + 1 - alpha;
		return [over(red), over(green), over(blue)];
	}
}

/** Face and size of a canvas font: `italic 8px 'Source Sans 3'`. */
function parseFont(font: string): { face: Face; size: number } {
	const size = Number(/([\d.]+)px/.exec(font)?.[1] ?? 10);
	const isItalic = /\bitalic\b/.test(font);
	const isBold = /\b(?:bold|[6-9]00)\b/.test(font);
	const face = isBold
		? isItalic
			? 'sansBoldItalic'
			: 'sansBold'
		: isItalic
			? 'sansItalic'
			: 'sans';
	return { face, size };
}
