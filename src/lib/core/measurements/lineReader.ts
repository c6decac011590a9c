import { measurementMessages } from '../messages/measurements';
import { readNumber } from '../units/readNumber';
import { inSi } from '../units/unit';
import type { Unit } from '../units/unit';
import type { ColumnMeaning } from './columns';
import { unitOf } from './mapping';
import type { ColumnMapping } from './mapping';
import { asName, NameColumn } from './nameColumn';
import { decimalsIn, NumberScanner } from './scanNumber';
import { splitLine } from './splitLine';

const NAMES = ['lot', 'waferLot', 'wafer', 'site', 'element', 'device'] as const;
const NUMBERS = ['temperature', 'frequency', 'bias', 'capacitance', 'current'] as const;
type NameMeaning = (typeof NAMES)[number];
type NumberMeaning = (typeof NUMBERS)[number];

const [QUOTE, SPACE, TAB] = [0x22, 0x20, 0x09];
/** A farad and more is no diode's capacitance, a million amperes no diode's current. */
const OVERFLOW = { capacitance: 1, current: 1e6 } as const;

interface NumberColumn {
	readonly position: number;
	readonly meaning: NumberMeaning;
	readonly unit: Unit;
	/** What the numbers of the file are in SI; temperatures, frequencies and biases come back. */
	readonly known: Map<number, number>;
}

/** What one line says. Temperature in °C, frequency in Hz, bias in V with reverse positive. */
export interface Reading {
	readonly names: Readonly<Record<NameMeaning, string>>;
	/** `NaN` where the file has no column for it. */
	readonly temperatureCelsius: number;
	readonly frequency: number;
	readonly bias: number;
	/**
	 * Capacitance, or current with the sign of the bias (reverse positive), in the file's own unit.
	 */
	readonly value: number;
	/** Decimals the value was written with. */
	readonly decimals: number;
	/** Whether the device is another than in the line before. */
	readonly isOtherDevice: boolean;
}

/**
 * Reads lines of the long layout, a reading a line, straight from bytes. A quoted line goes to the
 * parser, a number or name out of the ordinary to the text functions; both give the same answer.
 */
export class LineReader implements Reading {
	readonly names = { lot: '', waferLot: '', wafer: '', site: '', element: '', device: '' };
	temperatureCelsius = Number.NaN;
	frequency = Number.NaN;
	bias = Number.NaN;
	value = Number.NaN;
	decimals = 0;
	isOtherDevice = true;

	readonly #mapping: ColumnMapping;
	readonly #decoder: TextDecoder;
	readonly #separator: number;
	readonly #scanner: NumberScanner;
	readonly #nameColumns: readonly {
		readonly position: number;
		readonly meaning: NameMeaning;
		readonly column: NameColumn;
	}[];
	readonly #numberColumns: readonly NumberColumn[];
	readonly #starts: Int32Array;

	/** @param mapping complete, as `mappingProblems` says */
	constructor(mapping: ColumnMapping) {
		const { dialect, columns } = mapping;
		this.#mapping = mapping;
		this.#decoder = new TextDecoder(dialect.encoding);
		this.#separator = dialect.separator.charCodeAt(0);
		this.#scanner = new NumberScanner(dialect.decimalMark.charCodeAt(0));
		this.#starts = new Int32Array(columns.length + 2);
		const positionOf = (meaning: ColumnMeaning) =>
			columns.findIndex((column) => column.meaning === meaning);
		this.#nameColumns = NAMES.map((meaning) => ({
			position: positionOf(meaning),
			meaning,
			column: new NameColumn(dialect.encoding)
		})).filter(({ position }) => position >= 0);
		this.#numberColumns = NUMBERS.flatMap((meaning) => {
			const position = positionOf(meaning);
			const unit = unitOf(meaning, columns[position]?.unit ?? null);
			return unit === undefined ? [] : [{ position, meaning, unit, known: new Map() }];
		});
	}

	/** Reads a line; `undefined` when it is good, else why it can't be used. */
	read(bytes: Uint8Array, from: number, to: number): string | undefined {
		const starts = this.#starts;
		const separator = this.#separator;
		let fields = 1;
		starts[0] = from;
		for (let at = from; at < to; at++) {
			const byte = bytes[at];
			if (byte === separator) {
				if (fields < starts.length) starts[fields] = at + 1;
				fields += 1;
			} else if (byte === QUOTE) {
				return this.readText(this.#decoder.decode(bytes.subarray(from, to)));
			}
		}
		if (fields < starts.length) starts[fields] = to + 1;
		const wrong = this.#checkCount(fields, () => isBlank(bytes, starts[fields - 1]!, to));
		if (wrong !== undefined) return wrong;

		this.isOtherDevice = false;
		for (const { position, meaning, column } of this.#nameColumns) {
			const name = column.read(bytes, starts[position]!, starts[position + 1]! - 1);
			const problem = this.#takeName(meaning, name);
			if (problem !== undefined) return problem;
		}
		for (const column of this.#numberColumns) {
			let start = starts[column.position]!;
			let end = starts[column.position + 1]! - 1;
			while (start < end && bytes[start] === SPACE) start += 1;
			while (end > start && bytes[end - 1] === SPACE) end -= 1;
			const problem = this.#scanner.scan(bytes, start, end)
				? this.#takeNumber(column, this.#scanner.value, this.#scanner.decimals, () =>
						this.#decoder.decode(bytes.subarray(start, end))
					)
				: this.#takeText(column, this.#decoder.decode(bytes.subarray(start, end)));
			if (problem !== undefined) return problem;
		}
		return undefined;
	}

	/** The slow path, through the parser. */
	readText(line: string): string | undefined {
		const fields = splitLine(line, this.#mapping.dialect.separator);
		if (fields === undefined) return measurementMessages.quoteNotClosed();
		const wrong = this.#checkCount(fields.length, () => fields.at(-1) === '');
		if (wrong !== undefined) return wrong;

		this.isOtherDevice = false;
		for (const { position, meaning } of this.#nameColumns) {
			const problem = this.#takeName(meaning, asName(fields[position] ?? ''));
			if (problem !== undefined) return problem;
		}
		for (const column of this.#numberColumns) {
			const problem = this.#takeText(column, fields[column.position] ?? '');
			if (problem !== undefined) return problem;
		}
		return undefined;
	}

	/** A separator at the end of a line makes one more, empty field. */
	#checkCount(fields: number, isLastEmpty: () => boolean): string | undefined {
		const expected = this.#mapping.columns.length;
		if (fields === expected || (fields === expected + 1 && isLastEmpty())) return undefined;
		return measurementMessages.fieldCount(expected, fields);
	}

	#takeName(meaning: NameMeaning, name: string | undefined): string | undefined {
		if (name === undefined) return measurementMessages.badBytes();
		if (name === '' && (meaning === 'lot' || meaning === 'device')) {
			return measurementMessages.nameEmpty(meaning);
		}
		if (this.names[meaning] !== name) {
			this.names[meaning] = name;
			this.isOtherDevice = true;
		}
		return undefined;
	}

	#takeText(column: NumberColumn, text: string): string | undefined {
		const value = readNumber(text, this.#mapping.dialect.decimalMark);
		if (value === undefined) return measurementMessages.notANumber(column.meaning, text.trim());
		return this.#takeNumber(column, value, decimalsIn(text), () => text.trim());
	}

	#takeNumber(
		{ meaning, unit, known }: NumberColumn,
		value: number,
		decimals: number,
		read: () => string
	): string | undefined {
		if (meaning === 'capacitance') {
			if (!(value > 0)) return measurementMessages.capacitanceNotPositive(read());
			if (value * unit.scale >= OVERFLOW.capacitance) {
				return measurementMessages.capacitanceOverflow(read());
			}
			this.value = value;
			this.decimals = decimals;
			return undefined;
		}
		if (meaning === 'current') {
			if (Math.abs(value * unit.scale) >= OVERFLOW.current) {
				return measurementMessages.currentOverflow(read());
			}
			this.value = this.#reversePositive(value);
			this.decimals = decimals;
			return undefined;
		}
		let si = known.get(value);
		if (si === undefined) {
			si = inSi(value, unit);
			if (known.size < 4096) known.set(value, si);
		}
		switch (meaning) {
			case 'temperature':
				if (si < -273.15) return measurementMessages.temperatureBelowZero(read());
				this.temperatureCelsius = si;
				return undefined;
			case 'frequency':
				if (!(si > 0)) return measurementMessages.frequencyNotPositive(read());
				this.frequency = si;
				return undefined;
			case 'bias':
				this.bias = this.#reversePositive(si);
				return undefined;
			default:
				return meaning satisfies never;
		}
	}

	#reversePositive(value: number): number {
		// Adding zero makes zero of −0.
		return (this.#mapping.biasSign === 'reverseNegative' ? -value : value) + 0;
	}
}

function isBlank(bytes: Uint8Array, from: number, to: number): boolean {
	for (let at = from; at < to; at++) {
		if (bytes[at] !== SPACE && bytes[at] !== TAB) return false;
	}
	return true;
}
