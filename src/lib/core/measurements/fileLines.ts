import type { FileDialect } from './dialect';
import { ProblemList } from './problems';
import { isComment } from './splitLine';

const [LINE_FEED, CARRIAGE_RETURN, SPACE, TAB] = [0x0a, 0x0d, 0x20, 0x09];

/** Takes the bytes of a line with data on it; answers why it can't be used. */
export type TakeLine = (bytes: Uint8Array, from: number, to: number) => string | undefined;

/**
 * Cuts the bytes of a file, piece by piece, into lines. Every line below the header is taken, a
 * blank, a counted comment, or a problem with its number; none goes unsaid.
 */
export class FileLines {
	readonly problems = new ProblemList();
	readonly decoder: TextDecoder;
	readonly #dialect: FileDialect;
	readonly #takeLine: TakeLine;
	#rest = new Uint8Array(0);
	#line = 0;
	#comments = 0;
	#isStopped = false;

	constructor(dialect: FileDialect, takeLine: TakeLine) {
		this.#dialect = dialect;
		this.#takeLine = takeLine;
		this.decoder = new TextDecoder(dialect.encoding);
	}

	get comments(): number {
		return this.#comments;
	}

	/** Takes no further line: the file as a whole can't be used. */
	stop(): void {
		this.#isStopped = true;
	}

	/** Takes the next bytes of the file; lines may be cut anywhere. */
	push(bytes: Uint8Array): void {
		const firstEnd = this.#rest.length === 0 ? 0 : bytes.indexOf(LINE_FEED) + 1;
		if (this.#rest.length > 0) {
			if (firstEnd === 0) {
				this.#rest = joined(this.#rest, bytes);
				return;
			}
			const line = joined(this.#rest, bytes.subarray(0, firstEnd));
			this.#take(line, 0, line.length - 1);
		}
		let start = firstEnd;
		for (
			let end = bytes.indexOf(LINE_FEED, start);
			end >= 0 && !this.#isStopped;
			end = bytes.indexOf(LINE_FEED, start)
		) {
			this.#take(bytes, start, end);
			start = end + 1;
		}
		this.#rest = new Uint8Array(bytes.subarray(start));
	}

	/** Takes what is left: the last line may lack its end. */
	end(): void {
		if (this.#rest.length > 0) this.#take(this.#rest, 0, this.#rest.length);
		this.#rest = new Uint8Array(0);
	}

	#take(bytes: Uint8Array, start: number, end: number): void {
		this.#line += 1;
		const { dataLine, commentPrefix } = this.#dialect;
		if (this.#line < dataLine || this.#isStopped) return;
		let [from, to] = [start, end];
		while (to > from && (bytes[to - 1] === CARRIAGE_RETURN || bytes[to - 1] === SPACE)) to -= 1;
		while (from < to && bytes[from] === SPACE) from += 1;
		if (from === to || isBlankLine(bytes, from, to)) return;
		if (commentPrefix !== '' && bytes[from] === commentPrefix.charCodeAt(0)) {
			const text = this.decoder.decode(bytes.subarray(from, to));
			if (isComment(text, commentPrefix)) {
				this.#comments += 1;
				return;
			}
		}
		const problem = this.#takeLine(bytes, from, to);
		if (problem !== undefined) {
			const read = () => this.decoder.decode(bytes.subarray(from, to));
			this.problems.add(this.#line, read, problem);
		}
	}
}

function isBlankLine(bytes: Uint8Array, from: number, to: number): boolean {
	for (let at = from; at < to; at++) {
		if (bytes[at] !== SPACE && bytes[at] !== TAB) return false;
	}
	return true;
}

function joined(first: Uint8Array, second: Uint8Array): Uint8Array<ArrayBuffer> {
	const bytes = new Uint8Array(first.length + second.length);
	bytes.set(first);
	bytes.set(second, first.length);
	return bytes;
}
