import { z } from 'zod';
import { measurementMessages } from '../messages/measurements';
import { findUnit } from '../units/unit';
import type { Unit } from '../units/unit';
import { columnMeaning, MEANING_UNITS } from './columns';
import type { ColumnMeaning } from './columns';
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

const ONCE: readonly ColumnMeaning[] = ['lot', 'device', 'bias', 'capacitance'];

/** Why a mapping can't be used yet, one sentence each; empty when it is complete. */
export function mappingProblems(mapping: ColumnMapping, setup: MeasurementSetup): string[] {
	const { columns } = mapping;
	const count = (meaning: ColumnMeaning) =>
		columns.filter((column) => column.meaning === meaning).length;
	const says = (meaning: ColumnMeaning) => count(meaning) > 0;
	return [
		...ONCE.filter((meaning) => !says(meaning)).map(measurementMessages.columnMissing),
		...(says('temperature') || setup.temperatureCelsius !== null
			? []
			: [measurementMessages.temperatureMissing()]),
		...(says('frequency') || setup.frequencyHertz !== null
			? []
			: [measurementMessages.frequencyMissing()]),
		...columnMeaning.options
			.filter((meaning) => meaning !== 'ignore' && count(meaning) > 1)
			.map(measurementMessages.columnTwice),
		...columns
			.filter(({ meaning, unit }) => MEANING_UNITS[meaning] && unitOf(meaning, unit) === undefined)
			.map(({ header }) => measurementMessages.unitMissing(header))
	];
}

/** The unit a column is in, if it is one of its meaning's. */
export function unitOf(meaning: ColumnMeaning, symbol: string | null): Unit | undefined {
	const kind = MEANING_UNITS[meaning];
	return kind === undefined || symbol === null ? undefined : findUnit(kind, symbol);
}
