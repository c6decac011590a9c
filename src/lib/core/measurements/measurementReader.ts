import { measurementMessages } from '../messages/measurements';
import { contentOf } from './columns';
import { FileLines } from './fileLines';
import { LineReader } from './lineReader';
import type { ColumnMapping } from './mapping';
import type { ProblemList } from './problems';
import type { MeasurementSetup } from './setup';
import { MOST_BIASES, MOST_CONDITIONS, SweepTable } from './sweepTable';
import { takeWaferLot } from './waferLots';

/** Turns the bytes of a file, piece by piece, into sweeps of a capacitance or a current. */
export class MeasurementReader {
	readonly table: SweepTable;
	/** The wafer lot each lot comes from, where file or set-up say so. */
	readonly waferLotOf: Map<string, string>;
	/** Why the file as a whole can't be used. */
	refusal: string | undefined;

	readonly #lines: FileLines;
	readonly #setup: MeasurementSetup;
	readonly #reader: LineReader;
	readonly #hasWaferLot: boolean;
	#device = -1;

	constructor(mapping: ColumnMapping, setup: MeasurementSetup) {
		this.#setup = setup;
		this.#reader = new LineReader(mapping);
		this.#lines = new FileLines(mapping.dialect, (bytes, from, to) => {
			const problem = this.#reader.read(bytes, from, to) ?? this.#store();
			if (problem !== undefined) this.#device = -1;
			return problem;
		});
		this.table = new SweepTable(
			contentOf(mapping.columns) === 'current' ? 'current' : 'capacitance'
		);
		this.#hasWaferLot = mapping.columns.some(({ meaning }) => meaning === 'waferLot');
		this.waferLotOf = new Map(setup.waferLots.map(({ lot, waferLot }) => [lot, waferLot]));
	}

	get problems(): ProblemList {
		return this.#lines.problems;
	}

	get comments(): number {
		return this.#lines.comments;
	}

	get deviceCount(): number {
		return this.table.deviceCount;
	}

	/** Takes the next bytes of the file; lines may be cut anywhere. */
	push(bytes: Uint8Array): void {
		this.#lines.push(bytes);
	}

	/** Takes what is left: the last line may lack its end. */
	end(): void {
		this.#lines.end();
	}

	#store(): string | undefined {
		const { names, isOtherDevice, bias, value, decimals } = this.#reader;
		if (isOtherDevice || this.#device < 0) {
			const problem = this.#hasWaferLot
				? takeWaferLot(this.waferLotOf, names.lot, names.waferLot)
				: undefined;
			if (problem !== undefined) return problem;
			const { lot, wafer, site, element, device: name } = names;
			this.#device = this.table.deviceIndex({ lot, wafer, site, element, name });
		}
		const temperature = Number.isNaN(this.#reader.temperatureCelsius)
			? this.#setup.temperatureCelsius
			: this.#reader.temperatureCelsius;
		if (temperature === null) return measurementMessages.temperatureMissing();
		const frequency = this.#frequency();
		if (frequency === null) return measurementMessages.frequencyMissing();

		const condition = this.table.condition(temperature, frequency);
		if (condition === undefined) {
			this.#refuse(measurementMessages.tooManyConditions(MOST_CONDITIONS));
		} else if (!condition.add(this.#device, bias, value, decimals)) {
			this.#refuse(measurementMessages.tooManyBiases(MOST_BIASES, temperature));
		}
		return undefined;
	}

	/** In Hz; a current is measured at none. */
	#frequency(): number | null | undefined {
		if (this.table.quantity === 'current') return undefined;
		return Number.isNaN(this.#reader.frequency)
			? this.#setup.frequencyHertz
			: this.#reader.frequency;
	}

	#refuse(message: string): void {
		this.refusal = message;
		this.#lines.stop();
	}
}
