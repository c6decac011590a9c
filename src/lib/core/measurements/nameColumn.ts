/** U+FFFD stands where bytes were no text. */
const NOT_TEXT = '\ufffd';

/**
 * The names in one column of a file. Neighbouring lines mostly carry the same name, so the bytes of
 * the line before are compared first and text is made only when they differ.
 */
export class NameColumn {
	readonly #decoder: TextDecoder;
	#bytes = new Uint8Array(0);
	#name = '';

	constructor(encoding: string) {
		this.#decoder = new TextDecoder(encoding);
	}

	/** The name in a range of bytes, blanks around it left out; `undefined` when it is no text. */
	read(bytes: Uint8Array, from: number, to: number): string | undefined {
		if (this.#isSame(bytes, from, to)) return this.#name;
		const name = asName(this.#decoder.decode(bytes.subarray(from, to)));
		if (name !== undefined) {
			this.#bytes = new Uint8Array(bytes.subarray(from, to));
			this.#name = name;
		}
		return name;
	}

	#isSame(bytes: Uint8Array, from: number, to: number): boolean {
		const last = this.#bytes;
		if (last.length !== to - from || last.length === 0) return false;
		for (let i = 0; i < last.length; i++) {
			if (bytes[from + i] !== last[i]) return false;
		}
		return true;
	}
}

/** A field as a name; `undefined` when bytes of it were no text. */
export function asName(field: string): string | undefined {
	return field.includes(NOT_TEXT) ? undefined : field.trim();
}
