import { and, asc, eq, inArray } from 'drizzle-orm';
import { CHUNK, deviceColumns } from '$lib/core/measurements/blocks';
import { suspectReason } from '$lib/core/measurements/suspects';
import type { SuspectReason } from '$lib/core/measurements/suspects';
import type { Database } from './database';
import { deviceBlock, person, suspect, verdict } from './schema';

/** A sweep in quarantine with everything that made it suspect and everything decided on it. */
export interface ListedSuspect {
	readonly device: number;
	readonly conditionKey: string;
	readonly lot: string;
	readonly wafer: string;
	readonly site: string;
	readonly element: string;
	readonly name: string;
	readonly reasons: readonly SuspectReason[];
	/** Oldest first; the last one holds. */
	readonly verdicts: readonly {
		readonly decision: 'keep' | 'exclude';
		readonly reason: string;
		readonly byName: string;
		readonly at: string;
	}[];
}

/** The suspects of a set by device, then condition. */
export async function listSuspects(db: Database, set: number): Promise<ListedSuspect[]> {
	const rows = await db
		.select()
		.from(suspect)
		.where(eq(suspect.set, set))
		.orderBy(asc(suspect.device), asc(suspect.conditionKey), asc(suspect.id));
	const verdicts = await db
		.select({
			device: verdict.device,
			conditionKey: verdict.conditionKey,
			decision: verdict.decision,
			reason: verdict.reason,
			byName: person.name,
			at: verdict.at
		})
		.from(verdict)
		.innerJoin(person, eq(person.id, verdict.by))
		.where(eq(verdict.set, set))
		.orderBy(asc(verdict.id));

	const sweeps = new Map<string, typeof rows>();
	for (const row of rows) {
		const key = `${row.device} ${row.conditionKey}`;
		sweeps.set(key, [...(sweeps.get(key) ?? []), row]);
	}
	const nameOf = await readNames(
		db,
		set,
		rows.map(({ device }) => device)
	);
	return [...sweeps.values()].flatMap((reasons) => {
		const [first] = reasons;
		if (first === undefined) return [];
		const { device, conditionKey } = first;
		return [
			{
				device,
				conditionKey,
				...nameOf(device),
				reasons: reasons.map(({ reason }) => suspectReason.parse(reason)),
				verdicts: verdicts
					.filter((of) => of.device === device && of.conditionKey === conditionKey)
					.map(({ decision, reason, byName, at }) => ({ decision, reason, byName, at }))
			}
		];
	});
}

/** Reads only the chunks these devices are in. */
async function readNames(db: Database, set: number, devices: readonly number[]) {
	const chunks = [...new Set(devices.map((device) => Math.floor(device / CHUNK)))];
	const blocks =
		chunks.length === 0
			? []
			: await db
					.select()
					.from(deviceBlock)
					.where(and(eq(deviceBlock.set, set), inArray(deviceBlock.chunk, chunks)));
	const columnsOf = new Map(
		blocks.map(({ chunk, devices: columns }) => [chunk, deviceColumns.parse(columns)])
	);
	return (device: number) => {
		const columns = columnsOf.get(Math.floor(device / CHUNK));
		const row = device % CHUNK;
		return {
			lot: columns?.lot[row] ?? '',
			wafer: columns?.wafer[row] ?? '',
			site: columns?.site[row] ?? '',
			element: columns?.element[row] ?? '',
			name: columns?.name[row] ?? ''
		};
	};
}
