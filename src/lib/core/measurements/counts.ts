import { z } from 'zod';
import type { DeviceColumns } from './blocks';
import { devicesByLot } from './devicesByLot';
import type { Repeatability } from './repeatability';
import type { ConditionSweeps, SweepTable } from './sweepTable';

/** What an accepted set holds. */
export const setCounts = z.object({
	lots: z.number().int(),
	wafers: z.number().int(),
	devices: z.number().int(),
	/** A device at one temperature and frequency. */
	sweeps: z.number().int(),
	points: z.number().int(),
	/** Sweeps in quarantine when the set was accepted. */
	suspects: z.number().int(),
	/** Lines that couldn't be used and were left out by agreement. */
	skippedLines: z.number().int(),
	comments: z.number().int(),
	/** Of readings repeated at one bias; `null` when there are none. */
	repeatability: z
		.object({ degreesOfFreedom: z.number().int(), standardDeviation: z.number() })
		.nullable(),
	lotNames: z.array(
		z.object({ lot: z.string(), waferLot: z.string(), wafers: z.array(z.string()) })
	),
	conditions: z.array(
		z.object({
			quantity: z.enum(['capacitance', 'current']).default('capacitance'),
			conditionKey: z.string(),
			temperatureCelsius: z.number(),
			/** In Hz; `null` for a current. */
			frequency: z.number().nullable(),
			/** Different biases, the lowest and the highest in V. */
			biases: z.number().int(),
			lowestBias: z.number(),
			highestBias: z.number(),
			points: z.number().int(),
			/** Devices of each lot swept here, in the order of `lotNames`. */
			devices: z.array(z.number().int()),
			/** Lots with too few devices to find suspects among. */
			lotsNotJudged: z.array(z.string())
		})
	),
	/** Single readings, by characteristic and condition. */
	readings: z
		.array(
			z.object({
				/** Key of the catalogue. */
				characteristic: z.string(),
				conditionKey: z.string(),
				/** Symbol of the unit in the file. */
				unit: z.string(),
				readings: z.number().int(),
				/** Readings that are bounds. */
				censored: z.number().int(),
				/** Devices of each lot that have such a reading, in the order of `lotNames`. */
				devices: z.array(z.number().int()),
				lotsNotJudged: z.array(z.string())
			})
		)
		.default([])
});
export type SetCounts = z.infer<typeof setCounts>;

export interface CountedWith {
	readonly waferLotOf: ReadonlyMap<string, string>;
	readonly suspects: number;
	readonly skippedLines: number;
	readonly comments: number;
	readonly repeatability: Repeatability | undefined;
	/** Fewer devices of a lot are not judged. */
	readonly fewestInLot: number;
}

/** Counts a table of sweeps for the set's page and for scripts. */
export function countSet(table: SweepTable, known: CountedWith): SetCounts {
	const { members, lotNames, wafers } = countLots(table.devices, known.waferLotOf);
	const conditions = table.conditions().map((condition) => {
		const swept = members.map(
			([, indices]) => indices.filter((device) => isSwept(condition, device)).length
		);
		return {
			quantity: condition.quantity,
			conditionKey: condition.key,
			temperatureCelsius: condition.temperatureCelsius,
			frequency: condition.frequency ?? null,
			biases: new Set(condition.biases).size,
			lowestBias: Math.min(...condition.biases),
			highestBias: Math.max(...condition.biases),
			points: condition.points,
			devices: swept,
			lotsNotJudged: lotNames
				.filter((_, at) => (swept[at] ?? 0) > 0 && (swept[at] ?? 0) < known.fewestInLot)
				.map(({ lot }) => lot)
		};
	});
	return {
		lots: lotNames.length,
		wafers,
		devices: table.deviceCount,
		sweeps: total(conditions.map((condition) => total(condition.devices))),
		points: total(conditions.map(({ points }) => points)),
		suspects: known.suspects,
		skippedLines: known.skippedLines,
		comments: known.comments,
		repeatability: known.repeatability ?? null,
		lotNames,
		conditions,
		readings: []
	};
}

/** The lots of a set by name, with the devices of each. */
export function countLots(devices: DeviceColumns, waferLotOf: ReadonlyMap<string, string>) {
	const members = [...devicesByLot(devices.lot)].sort(([a], [b]) => (a < b ? -1 : 1));
	const lotNames = members.map(([lot, indices]) => ({
		lot,
		waferLot: waferLotOf.get(lot) ?? lot,
		wafers: [...new Set(indices.map((device) => devices.wafer[device] ?? ''))].sort()
	}));
	return { members, lotNames, wafers: total(lotNames.map(({ wafers }) => wafers.length)) };
}

function total(values: readonly number[]): number {
	return values.reduce((sum, value) => sum + value, 0);
}

function isSwept(condition: ConditionSweeps, device: number): boolean {
	return condition.biases.some((_, column) => !Number.isNaN(condition.value(device, column)));
}
