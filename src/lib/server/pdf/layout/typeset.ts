import { symbolText, type LetterSymbol } from '../../../core/characteristics/symbol';
import type { RichText } from '../../../core/datasheet/document';
import type { Face } from '../fonts/faces';
import { measureText } from '../fonts/shapeText';
import { bindUnits } from './bindUnits';
import type { Box, Ink, Tag, TextPiece } from './box';

/** How a stretch of text is set. */
export interface TextStyle {
	readonly face: Face;
	/** Face of quantities: italic of the same weight. */
	readonly italic: Face;
	readonly size: number;
	readonly leading: number;
	readonly tracking?: number;
}

/** A stretch that keeps its style; a symbol is one that can't be broken. */
export interface Span {
	readonly pieces: readonly TextPiece[];
	readonly actual?: string;
	/** Digits bound to a limit: a dotted underline on a proof. */
	readonly isBound?: boolean;
	/** Name of the place it leads to, and its node in the tag tree. */
	readonly link?: { readonly to: string; readonly tag: number };
}

export interface Line {
	readonly width: number;
	/** Spans with their distance from the line's left end. */
	readonly spans: readonly (Span & { readonly x: number; readonly width: number })[];
}

/** Subscripts: 0.74 of the size, lowered by 0.26 of their own size. */
const SUBSCRIPT = { size: 0.74, lower: 0.26 };
/** Superscripts: 0.70 of the size, raised by 0.38 of their own size. */
const SUPERSCRIPT = { size: 0.7, raise: 0.38 };

/** A piece with its width. */
export function piece(
	text: string,
	style: Omit<TextPiece, 'text' | 'width' | 'after'>,
	after = 0
): TextPiece {
	const width = measureText(text, style);
	return { ...style, text, width, ...(after > 0 && { after }) };
}

const tracked = (style: TextStyle) =>
	style.tracking === undefined ? {} : { tracking: style.tracking };

export const textSpan = (text: string, style: TextStyle): Span => ({
	pieces: [
		piece(bindUnits(text.normalize('NFC')), {
			face: style.face,
			size: style.size,
			...tracked(style)
		})
	]
});

/** A letter symbol: italic quantity, upright subscript. A bare f or t keeps off what follows. */
export function symbolSpan(symbol: LetterSymbol, style: TextStyle): Span {
	const { size } = style;
	const small = size * SUBSCRIPT.size;
	const isBare = symbol.subscript === undefined && /^[ft]$/.test(symbol.quantity);
	return {
		pieces: [
			piece(symbol.quantity, { face: style.italic, size }, isBare ? size * 0.07 : 0),
			...(symbol.subscript === undefined
				? []
				: [
						piece(symbol.subscript, {
							face: style.face,
							size: small,
							rise: -small * SUBSCRIPT.lower
						})
					])
		],
		...(symbol.subscript !== undefined && { actual: symbolText(symbol) })
	};
}

/** Words that lead to another place of the sheet; they stay together on a line. */
export function linkSpan(
	text: string,
	style: TextStyle,
	link: { readonly to: string; readonly tag: number }
): Span {
	return { ...textSpan(text.replaceAll(' ', '\u00a0'), style), link };
}

/** A mark at the shoulder of a number. */
export function superscript(text: string, style: Pick<TextStyle, 'face' | 'size'>): TextPiece {
	const small = style.size * SUPERSCRIPT.size;
	return piece(text, { face: style.face, size: small, rise: small * SUPERSCRIPT.raise });
}

/** Spans of a rich text; bound digits are marked when it is a proof. */
export function richSpans(text: RichText, style: TextStyle, isProof = false): Span[] {
	return text.map((run) => {
		switch (run.kind) {
			case 'text':
				return textSpan(run.text, style);
			case 'symbol':
				return symbolSpan(run.symbol, style);
			case 'value':
				return { ...textSpan(run.text, style), ...(isProof && { isBound: true }) };
			default:
				return run satisfies never;
		}
	});
}

export const spanWidth = (span: Span) =>
	span.pieces.reduce((sum, { width, after }) => sum + width + (after ?? 0), 0);

/** What stays together on a line: spans between two breakable spaces. */
interface Word {
	readonly spans: readonly Span[];
	readonly width: number;
	/** The space before it, in the style it is set in. */
	readonly space: TextPiece | null;
}

/** Breaks spans into lines no wider than `width`; a word wider than that is broken between letters. */
export function breakLines(spans: readonly Span[], width: number): Line[] {
	const lines: Word[][] = [[]];
	let used = 0;
	for (const word of wordsOf(spans).flatMap((each) => fitWord(each, width))) {
		const line = lines.at(-1) ?? [];
		const space = line.length === 0 ? 0 : (word.space?.width ?? 0);
		if (line.length > 0 && used + space + word.width > width + 0.01) {
			lines.push([word]);
			used = word.width;
		} else {
			line.push(word);
			used += space + word.width;
		}
	}
	return lines.map(joinWords).map((line, at) => (at < lines.length - 1 ? spaced(line) : line));
}

/** A line with a space after its last word, outside its width: text copies with words apart. */
function spaced(line: Line): Line {
	const last = line.spans.at(-1);
	const [only, ...more] = last?.pieces ?? [];
	if (!last || !only) return line;
	const trailing =
		more.length === 0 &&
		last.actual === undefined &&
		last.isBound === undefined &&
		last.link === undefined
			? { ...last, pieces: [repiece(only, `${only.text} `)] }
			: null;
	if (trailing) return { ...line, spans: [...line.spans.slice(0, -1), trailing] };
	const space = { pieces: [repiece({ ...only, rise: 0 }, ' ')], x: line.width, width: 0 };
	return { ...line, spans: [...line.spans, space] };
}

/** One line, however wide. */
export const oneLine = (spans: readonly Span[]): Line => joinWords(wordsOf(spans));

function wordsOf(spans: readonly Span[]): Word[] {
	const words: { spans: Span[]; space: TextPiece | null }[] = [];
	let isOpen = false;
	let space: TextPiece | null = null;
	const add = (span: Span) => {
		const last = words.at(-1);
		if (isOpen && last) last.spans.push(span);
		else words.push({ spans: [span], space });
		isOpen = true;
		space = null;
	};
	for (const span of spans) {
		const [only, ...more] = span.pieces;
		if (!only || more.length > 0 || span.actual !== undefined) {
			add(span);
			continue;
		}
		for (const part of only.text.split(/( +)/)) {
			if (part === '') continue;
			if (part.startsWith(' ')) {
				isOpen = false;
				space = repiece(only, ' ');
			} else add({ ...span, pieces: [repiece(only, part)] });
		}
	}
	return words.map((word) => ({ ...word, width: sumWidths(word.spans) }));
}

const sumWidths = (spans: readonly Span[]) => spans.reduce((sum, span) => sum + spanWidth(span), 0);

const repiece = ({ width: _, ...style }: TextPiece, text: string): TextPiece => ({
	...style,
	text,
	width: measureText(text, style)
});

/** A word as it is, or in parts when no line can hold it. */
function fitWord(word: Word, width: number): Word[] {
	const [span] = word.spans;
	const [only] = span?.pieces ?? [];
	if (word.width <= width || !span || !only || word.spans.length > 1) return [word];
	const parts: string[] = [''];
	for (const letter of only.text) {
		const longer = (parts.at(-1) ?? '') + letter;
		if (measureText(longer, only) > width && longer !== letter) parts.push(letter);
		else parts[parts.length - 1] = longer;
	}
	return parts.map((text, at) => {
		const part = repiece(only, text);
		return {
			spans: [{ ...span, pieces: [part] }],
			width: part.width,
			space: at === 0 ? word.space : null
		};
	});
}

/** Words side by side; neighbours of one style become one piece, so that they are set in one go. */
function joinWords(words: readonly Word[]): Line {
	const spans: (Span & { x: number; width: number })[] = [];
	let x = 0;
	const push = (span: Span) => {
		const last = spans.at(-1);
		const [left, right] = [last?.pieces[0], span.pieces[0]];
		if (last && left && right && canJoin(last, span)) {
			const joined = joinPieces(left, right);
			x += joined.width - last.width;
			spans[spans.length - 1] = { ...last, pieces: [joined], width: joined.width };
			return;
		}
		const width = spanWidth(span);
		spans.push({ ...span, x, width });
		x += width;
	};
	words.forEach((word, at) => {
		if (at > 0 && word.space) push({ pieces: [word.space] });
		word.spans.forEach(push);
	});
	return { width: x, spans };
}

/** Beside a space nothing kerns: widths add up there. */
function joinPieces(left: TextPiece, right: TextPiece): TextPiece {
	const text = left.text + right.text;
	return left.text.endsWith(' ') || right.text.startsWith(' ')
		? { ...left, text, width: left.width + right.width }
		: repiece(left, text);
}

function canJoin(left: Span, right: Span): boolean {
	const [a, b] = [left.pieces[0], right.pieces[0]];
	return (
		left.pieces.length === 1 &&
		right.pieces.length === 1 &&
		left.actual === undefined &&
		right.actual === undefined &&
		(left.isBound ?? false) === (right.isBound ?? false) &&
		left.link?.tag === right.link?.tag &&
		a?.face === b?.face &&
		a?.size === b?.size &&
		a?.rise === b?.rise &&
		a?.tracking === b?.tracking
	);
}

/** Where and as what a line stands. */
export interface LinePlace {
	readonly tag: Tag;
	readonly x: number;
	readonly y: number;
	readonly align?: 'left' | 'right' | 'centre';
	readonly ink?: Ink;
}

const SHIFT = { left: 0, centre: 0.5, right: 1 } as const;

/** Boxes of a line; `x` is its left end, middle or right end. */
export function lineBoxes(line: Line, place: LinePlace): Box[] {
	const left = place.x - line.width * SHIFT[place.align ?? 'left'];
	return line.spans.flatMap((span): Box[] => [
		{
			kind: 'text',
			tag: span.link?.tag ?? place.tag,
			x: left + span.x,
			y: place.y,
			pieces: span.pieces,
			...(span.actual !== undefined && { actual: span.actual }),
			...(span.link !== undefined && { link: span.link.to }),
			...(place.ink !== undefined && { ink: place.ink })
		},
		...(span.isBound
			? [
					{
						kind: 'rule' as const,
						tag: null,
						from: [left + span.x, place.y + 2.2] as const,
						to: [left + span.x + span.width, place.y + 2.2] as const,
						weight: 0.5,
						dash: [0.8, 1.2]
					}
				]
			: [])
	]);
}

/** Lines under each other from the first baseline. */
export const paragraphBoxes = (lines: readonly Line[], place: LinePlace, leading: number): Box[] =>
	lines.flatMap((line, at) => lineBoxes(line, { ...place, y: place.y + at * leading }));
