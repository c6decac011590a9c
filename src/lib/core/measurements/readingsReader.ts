import { measurementMessages } from '../messages/measurements';
import { FileLines } from './fileLines';
import type { ColumnMapping } from './mapping';
import type { ProblemList } from './problems';
import { ReadingLineReader } from './readingLine';
import type { ScalarReading } from './readingLine';
import { MOST_REPEATS, MOST_SERIES, ReadingTable } from './readingTable';
import type { MeasurementSetup } from './setup';
import { takeWaferLot } from './waferLots';

/** Turns the bytes of a file, piece by piece, into single readings. */
export class ReadingsReader {
	readonly table = new ReadingTable();
	/** The wafer lot each lot comes from, where file or set-up say so. */
	readonly waferLotOf: Map<string, string>;
	/** Why the file as a whole can't be used. */
	refusal: string | undefined;
	readonly #lines: FileLines;

	constructor(mapping: ColumnMapping, setup: MeasurementSetup) {
		const reader = new ReadingLineReader(mapping, setup.temperatureCelsius);
		this.#lines = new FileLines(mapping.dialect, (bytes, from, to) => {
			const line = reader.read(this.#lines.decoder.decode(bytes.subarray(from, to)));
			return line.status === 'refused' ? line.message : this.#store(line.reading);
		});
		this.waferLotOf = new Map(setup.waferLots.map(({ lot, waferLot }) => [lot, waferLot]));
	}

	get problems(): ProblemList {
		return this.#lines.problems;
	}

	get comments(): number {
		return this.#lines.comments;
	}

	get deviceCount(): number {
		return this.table.devices.count;
	}

	/** Takes the next bytes of the file; lines may be cut anywhere. */
	push(bytes: Uint8Array): void {
		this.#lines.push(bytes);
	}

	/** Takes what is left: the last line may lack its end. */
	end(): void {
		this.#lines.end();
	}

	#store(reading: ScalarReading): string | undefined {
		const { characteristic, condition, unit, lot, wafer, site, element } = reading;
		const problem = takeWaferLot(this.waferLotOf, lot, reading.waferLot);
		if (problem !== undefined) return problem;

		const series = this.table.seriesOf(characteristic, condition, unit);
		if (series === undefined) {
			this.#refuse(measurementMessages.tooManySeries(MOST_SERIES));
			return undefined;
		}
		if (series.unit.symbol !== unit.symbol) {
			return measurementMessages.unitDiffers(characteristic.key, series.unit.symbol, unit.symbol);
		}
		const device = this.table.devices.indexOf({ lot, wafer, site, element, name: reading.device });
		const outcome = series.add(device, reading.value, reading.censored, reading.decimals);
		switch (outcome) {
			case 'taken':
				return undefined;
			case 'contradiction':
				return measurementMessages.boundsContradict(characteristic.key, reading.device);
			case 'tooMany':
				this.#refuse(measurementMessages.tooManyRepeats(MOST_REPEATS, characteristic.key));
				return undefined;
			default:
				return outcome satisfies never;
		}
	}

	#refuse(message: string): void {
		this.refusal = message;
		this.#lines.stop();
	}
}
