import { z } from 'zod';
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
			conditionKey: z.string(),
			temperatureCelsius: z.number(),
			frequency: z.number(),
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
	)
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
	const { devices } = table;
	const members = [...devicesByLot(devices.lot)].sort(([a], [b]) => (a < b ? -1 : 1));
	const lotNames = members.map(([lot, indices]) => ({
		lot,
		waferLot: known.waferLotOf.get(lot) ?? lot,
		wafers: [...new Set(indices.map((device) => devices.wafer[device] ?? ''))].sort()
	}));
	const conditions = table.conditions().map((condition) => {
		const swept = members.map(
			([, indices]) => indices.filter((device) => isSwept(condition, device)).length
		);
		return {
			conditionKey: condition.key,
			temperatureCelsius: condition.temperatureCelsius,
			frequency: condition.frequency,
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
	const total = (values: readonly number[]) => values.reduce((sum, value) => sum + value, 0);
	return {
		lots: lotNames.length,
		wafers: total(lotNames.map(({ wafers }) => wafers.length)),
		devices: table.deviceCount,
		sweeps: total(conditions.map((condition) => total(condition.devices))),
		points: total(conditions.map(({ points }) => points)),
		suspects: known.suspects,
		skippedLines: known.skippedLines,
		comments: known.comments,
		repeatability: known.repeatability ?? null,
		lotNames,
		conditions
	};
}

function isSwept(condition: ConditionSweeps, device: number): boolean {
	return condition.biases.some((_, column) => !Number.isNaN(condition.value(device, column)));
}
