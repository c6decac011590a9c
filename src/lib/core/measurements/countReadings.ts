import { countLots } from './counts';
import type { CountedWith, SetCounts } from './counts';
import type { ReadingTable } from './readingTable';

type Known = Omit<CountedWith, 'repeatability' | 'fewestInLot'> & {
	/** Of each series, in their order. */
	readonly lotsNotJudged: readonly (readonly string[])[];
};

/** Counts a table of single readings for the set's page and for scripts. */
export function countReadings(table: ReadingTable, known: Known): SetCounts {
	const { members, lotNames, wafers } = countLots(table.devices.columns, known.waferLotOf);
	const series = table.series();
	return {
		lots: lotNames.length,
		wafers,
		devices: table.devices.count,
		sweeps: 0,
		points: series.reduce((sum, { readings }) => sum + readings, 0),
		suspects: known.suspects,
		skippedLines: known.skippedLines,
		comments: known.comments,
		repeatability: null,
		lotNames,
		conditions: [],
		readings: series.map((of, position) => ({
			characteristic: of.characteristic.key,
			conditionKey: of.key,
			unit: of.unit.symbol,
			readings: of.readings,
			censored: of.censoredReadings,
			devices: members.map(
				([, devices]) => devices.filter((device) => !Number.isNaN(of.at(device, 0).value)).length
			),
			lotsNotJudged: [...(known.lotsNotJudged[position] ?? [])]
		}))
	};
}
