import type { FileDialect } from './dialect';

/** Bytes of the head that are kept for the preview. */
const HEAD_BYTES = 256 * 1024;
const [LINE_FEED, NUL] = [0x0a, 0x00];

/** What a first pass over a file finds. */
export type SurveyOutcome =
	| {
			readonly status: 'text';
			/** The first lines, the last of them whole. */
			readonly head: string;
			readonly encoding: FileDialect['encoding'];
			readonly lineCount: number;
	  }
	| { readonly status: 'empty' | 'utf16' | 'binary' };

/** Passes over the bytes of a file once, keeping its head and counting its lines. */
export class FileSurvey {
	#head: Uint8Array[] = [];
	#kept = 0;
	#lineFeeds = 0;
	#last: number | undefined;

	push(bytes: Uint8Array): void {
		if (bytes.length === 0) return;
		if (this.#kept < HEAD_BYTES) {
			const part = new Uint8Array(bytes.subarray(0, HEAD_BYTES - this.#kept));
			this.#head.push(part);
			this.#kept += part.length;
		}
		for (let at = bytes.indexOf(LINE_FEED); at >= 0; at = bytes.indexOf(LINE_FEED, at + 1)) {
			this.#lineFeeds += 1;
		}
		this.#last = bytes.at(-1);
	}

	outcome(): SurveyOutcome {
		const bytes = new Uint8Array(this.#kept);
		let at = 0;
		for (const part of this.#head) {
			bytes.set(part, at);
			at += part.length;
		}
		if (bytes.length === 0) return { status: 'empty' };
		const mark = `${bytes[0]},${bytes[1]}`;
		if (mark === '255,254' || mark === '254,255') return { status: 'utf16' };
		if (bytes.includes(NUL)) return { status: 'binary' };

		const whole =
			bytes.length < HEAD_BYTES ? bytes : bytes.subarray(0, bytes.lastIndexOf(LINE_FEED) + 1);
		const encoding = isUtf8(whole) ? 'utf-8' : 'windows-1252';
		return {
			status: 'text',
			head: new TextDecoder(encoding).decode(whole),
			encoding,
			lineCount: this.#lineFeeds + (this.#last === LINE_FEED ? 0 : 1)
		};
	}
}

function isUtf8(bytes: Uint8Array): boolean {
	try {
		new TextDecoder('utf-8', { fatal: true }).decode(bytes);
		return true;
	} catch {
		return false;
	}
}
