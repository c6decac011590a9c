import { measurementMessages } from '../messages/measurements';
import { LineReader } from './lineReader';
import type { ColumnMapping } from './mapping';
import { ProblemList } from './problems';
import type { MeasurementSetup } from './setup';
import { isComment } from './splitLine';
import { MOST_BIASES, MOST_CONDITIONS, SweepTable } from './sweepTable';

const [LINE_FEED, CARRIAGE_RETURN, SPACE, TAB] = [0x0a, 0x0d, 0x20, 0x09];

/**
 * Turns the bytes of a file, piece by piece, into sweeps. Every line below the header is a reading,
 * a blank, a counted comment, or a problem with its number; none goes unsaid.
 */
export class MeasurementReader {
	readonly table = new SweepTable();
	readonly problems = new ProblemList();
	/** The wafer lot each lot comes from, where file or set-up say so. */
	readonly waferLotOf: Map<string, string>;
	/** Why the file as a whole can't be used. */
	refusal: string | undefined;

	readonly #mapping: ColumnMapping;
	readonly #setup: MeasurementSetup;
	readonly #reader: LineReader;
	readonly #decoder: TextDecoder;
	readonly #hasWaferLot: boolean;
	#rest = new Uint8Array(0);
	#line = 0;
	#comments = 0;
	#device = -1;

	constructor(mapping: ColumnMapping, setup: MeasurementSetup) {
		this.#mapping = mapping;
		this.#setup = setup;
		this.#reader = new LineReader(mapping);
		this.#decoder = new TextDecoder(mapping.dialect.encoding);
		this.#hasWaferLot = mapping.columns.some(({ meaning }) => meaning === 'waferLot');
		this.waferLotOf = new Map(setup.waferLots.map(({ lot, waferLot }) => [lot, waferLot]));
	}

	get comments(): number {
		return this.#comments;
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
			end >= 0 && this.refusal === undefined;
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
		const { dialect } = this.#mapping;
		if (this.#line < dialect.dataLine || this.refusal !== undefined) return;
		let [from, to] = [start, end];
		while (to > from && (bytes[to - 1] === CARRIAGE_RETURN || bytes[to - 1] === SPACE)) to -= 1;
		while (from < to && bytes[from] === SPACE) from += 1;
		if (from === to || isBlankLine(bytes, from, to)) return;
		if (dialect.commentPrefix !== '' && bytes[from] === dialect.commentPrefix.charCodeAt(0)) {
			const text = this.#decoder.decode(bytes.subarray(from, to));
			if (isComment(text, dialect.commentPrefix)) {
				this.#comments += 1;
				return;
			}
		}
		const problem = this.#reader.read(bytes, from, to) ?? this.#store();
		if (problem !== undefined) {
			this.#device = -1;
			const read = () => this.#decoder.decode(bytes.subarray(from, to));
			this.problems.add(this.#line, read, problem);
		}
	}

	#store(): string | undefined {
		const { names, isOtherDevice, bias, capacitance, decimals } = this.#reader;
		if (isOtherDevice || this.#device < 0) {
			const problem = this.#hasWaferLot ? this.#takeWaferLot(names.lot, names.waferLot) : undefined;
			if (problem !== undefined) return problem;
			const { lot, wafer, site, element, device: name } = names;
			this.#device = this.table.deviceIndex({ lot, wafer, site, element, name });
		}
		const temperature = Number.isNaN(this.#reader.temperatureCelsius)
			? this.#setup.temperatureCelsius
			: this.#reader.temperatureCelsius;
		const frequency = Number.isNaN(this.#reader.frequency)
			? this.#setup.frequencyHertz
			: this.#reader.frequency;
		if (temperature === null) return measurementMessages.temperatureMissing();
		if (frequency === null) return measurementMessages.frequencyMissing();

		const condition = this.table.condition(temperature, frequency);
		if (condition === undefined) {
			this.refusal = measurementMessages.tooManyConditions(MOST_CONDITIONS);
		} else if (!condition.add(this.#device, bias, capacitance, decimals)) {
			this.refusal = measurementMessages.tooManyBiases(MOST_BIASES, temperature);
		}
		return undefined;
	}

	#takeWaferLot(lot: string, waferLot: string): string | undefined {
		if (waferLot === '') return undefined;
		const known = this.waferLotOf.get(lot);
		if (known === undefined) this.waferLotOf.set(lot, waferLot);
		return known === undefined || known === waferLot
			? undefined
			: measurementMessages.waferLotTwice(lot, known, waferLot);
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
