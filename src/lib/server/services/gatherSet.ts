import { contentOf } from '$lib/core/measurements/columns';
import { countReadings } from '$lib/core/measurements/countReadings';
import { countSet, type SetCounts } from '$lib/core/measurements/counts';
import { unitOf, type ColumnMapping } from '$lib/core/measurements/mapping';
import { MeasurementReader } from '$lib/core/measurements/measurementReader';
import { findReadingSuspects } from '$lib/core/measurements/readingSuspects';
import { ReadingsReader } from '$lib/core/measurements/readingsReader';
import { repeatability } from '$lib/core/measurements/repeatability';
import type { MeasurementSetup } from '$lib/core/measurements/setup';
import { FEWEST_IN_LOT, findSuspects, type Suspect } from '$lib/core/measurements/suspects';
import { measurementMessages } from '$lib/core/messages/measurements';
import type { Connection } from '../db/database';
import type { JobContext } from '../work/jobHandler';
import { stageBlocks, stageReadings } from './stageSet';

/** Reads the bytes of a file as its mapping says: sweeps or single readings. */
export type FileReader = MeasurementReader | ReadingsReader;

/** What is to be stored of a file. */
export interface GatheredSet {
	readonly counts: SetCounts;
	readonly suspects: readonly Suspect[];
	/** Stores devices and blocks under a staged set. */
	stage(db: Connection, set: number): Promise<void>;
}

/** The mapping named no unit for what was swept, which `mappingProblems` would have said. */
class SweptUnitMissingError extends Error {
	override readonly name = 'SweptUnitMissingError';
	constructor(readonly quantity: string) {
		super(`a mapped file of sweeps requires the unit of its ${quantity}`);
	}
}

/** Between two pieces of work that only compute, timers and other requests get their turn. */
const breathe = () => new Promise((next) => setImmediate(next));

export function openReader(mapping: ColumnMapping, setup: MeasurementSetup): FileReader {
	return contentOf(mapping.columns) === 'value'
		? new ReadingsReader(mapping, setup)
		: new MeasurementReader(mapping, setup);
}

/** Looks for suspects in what was read, and counts it. */
export function gatherSet(
	reader: FileReader,
	mapping: ColumnMapping,
	job: JobContext
): Promise<GatheredSet> {
	return reader instanceof ReadingsReader
		? gatherReadings(reader, job)
		: gatherSweeps(reader, mapping, job);
}

async function gatherSweeps(
	reader: MeasurementReader,
	mapping: ColumnMapping,
	job: JobContext
): Promise<GatheredSet> {
	const { table } = reader;
	const conditions = table.conditions();
	const repeats = repeatability(conditions, table.deviceCount);
	const suspects: Suspect[] = [];
	for (const [done, condition] of conditions.entries()) {
		job.report({ done, total: conditions.length, words: measurementMessages.judging() });
		suspects.push(...findSuspects(condition, table.devices.lot, repeats));
		await breathe();
	}
	const counts = countSet(table, {
		...countedWith(reader, suspects),
		repeatability: repeats,
		fewestInLot: FEWEST_IN_LOT
	});
	const column = mapping.columns.find(({ meaning }) => meaning === table.quantity);
	const unit = unitOf(table.quantity, column?.unit ?? null);
	if (unit === undefined) throw new SweptUnitMissingError(table.quantity);
	return {
		counts,
		suspects,
		stage: (db, set) => stageBlocks(db, { set, table, unitScale: unit.scale, job })
	};
}

async function gatherReadings(reader: ReadingsReader, job: JobContext): Promise<GatheredSet> {
	const { table } = reader;
	const series = table.series();
	const suspects: Suspect[] = [];
	const lotsNotJudged: (readonly string[])[] = [];
	for (const [done, of] of series.entries()) {
		job.report({ done, total: series.length, words: measurementMessages.judgingReadings() });
		const judged = findReadingSuspects(of, table.devices.columns.lot);
		suspects.push(...judged.suspects);
		lotsNotJudged.push(judged.lotsNotJudged);
		await breathe();
	}
	return {
		counts: countReadings(table, { ...countedWith(reader, suspects), lotsNotJudged }),
		suspects,
		stage: (db, set) => stageReadings(db, { set, table, job })
	};
}

function countedWith(reader: FileReader, suspects: readonly Suspect[]) {
	return {
		waferLotOf: reader.waferLotOf,
		suspects: new Set(suspects.map(({ device, conditionKey }) => `${device} ${conditionKey}`)).size,
		skippedLines: reader.problems.total,
		comments: reader.comments
	};
}
