import { z } from 'zod';
import { measurementMessages } from '../messages/measurements';
import type { Unit } from '../units/unit';
import {
	columnMeaning,
	contentOf,
	FILE_CONTENTS,
	findMeaningUnit,
	unitsOfMeaning
} from './columns';
import type { ColumnMeaning, FileContent } from './columns';
import { fileDialect } from './dialect';
import type { MeasurementSetup } from './setup';

/** Which sign the file gives a reverse bias. */
export const biasSign = z.enum(['reversePositive', 'reverseNegative']);
export type BiasSign = z.infer<typeof biasSign>;

export const mappedColumn = z.object({
	/** As the file's header names it; for people only. */
	header: z.string(),
	meaning: columnMeaning,
	/** Symbol of the unit; `null` for names and where it is not said yet. */
	unit: z.string().nullable()
});
export type MappedColumn = z.infer<typeof mappedColumn>;

/** What the columns of a file mean, as a person confirmed it. */
export const columnMapping = z.object({
	dialect: fileDialect,
	/** One entry a column, in the file's order. */
	columns: z.array(mappedColumn).min(2),
	biasSign,
	/** Lines that can't be read and that a person agreed to leave out: exactly so many. */
	skipLines: z.number().int().min(0)
});
export type ColumnMapping = z.infer<typeof columnMapping>;

/** What a file of sweeps and one of readings must have. */
const NEEDED = {
	capacitance: ['lot', 'device', 'bias'],
	current: ['lot', 'device', 'bias'],
	value: ['lot', 'device', 'characteristic']
} as const satisfies Record<FileContent, readonly ColumnMeaning[]>;

/** Why a mapping can't be used yet, one sentence each; empty when it is complete. */
export function mappingProblems(mapping: ColumnMapping, setup: MeasurementSetup): string[] {
	const { columns } = mapping;
	const count = (meaning: ColumnMeaning) =>
		columns.filter((column) => column.meaning === meaning).length;
	const says = (meaning: ColumnMeaning) => count(meaning) > 0;
	const content = contentOf(columns);
	const isTold = says('unit');
	return [
		...NEEDED[content ?? 'capacitance']
			.filter((meaning) => !says(meaning))
			.map(measurementMessages.columnMissing),
		...(content === undefined ? [measurementMessages.nothingMeasured()] : []),
		...(FILE_CONTENTS.filter(says).length > 1 ? [measurementMessages.contentTwice()] : []),
		...(says('temperature') || setup.temperatureCelsius !== null
			? []
			: [measurementMessages.temperatureMissing()]),
		...(content !== 'capacitance' || says('frequency') || setup.frequencyHertz !== null
			? []
			: [measurementMessages.frequencyMissing()]),
		...columnMeaning.options
			.filter((meaning) => meaning !== 'ignore' && count(meaning) > 1)
			.map(measurementMessages.columnTwice),
		...columns
			.filter(
				({ meaning, unit }) => needsUnit(meaning, isTold) && unitOf(meaning, unit) === undefined
			)
			.map(({ header }) => measurementMessages.unitMissing(header)),
		...columns
			.filter(({ meaning, unit }) => meaning === 'value' && isTold && unit !== null)
			.map(({ header }) => measurementMessages.unitTwice(header))
	];
}

/** @param isTold whether a column states the unit of each value */
export function needsUnit(meaning: ColumnMeaning, isTold: boolean): boolean {
	return unitsOfMeaning(meaning).length > 0 && !(meaning === 'value' && isTold);
}

/** The unit a column is in, if it is one of its meaning's. */
export function unitOf(meaning: ColumnMeaning, symbol: string | null): Unit | undefined {
	return symbol === null ? undefined : findMeaningUnit(meaning, symbol);
}
