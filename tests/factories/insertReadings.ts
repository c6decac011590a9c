import type { Condition } from '$lib/core/characteristics/condition';
import { conditionKey } from '$lib/core/characteristics/condition';
import { packFlags, packMatrix } from '$lib/core/measurements/blocks';
import type { Connection } from '$lib/server/db/database';
import { readingBlock } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';

/** Single readings of the devices of a set, as the import stores them; one chunk at most. */
export async function insertReadings(
	db: Connection,
	set: number,
	of: {
		readonly characteristic: string;
		readonly condition: Condition;
		readonly unitScale: number;
		readonly values: readonly number[];
		/** At most (−1), exactly (0), at least (1); all exact, unless given. */
		readonly censored?: readonly number[];
	}
): Promise<void> {
	const { characteristic, condition, unitScale, values } = of;
	const flags = Int8Array.from(of.censored ?? values.map(() => 0));
	await write(db, (tx) =>
		tx.insert(readingBlock).values({
			set,
			characteristic,
			conditionKey: conditionKey(condition),
			repeat: 0,
			chunk: 0,
			unitScale,
			values: Buffer.from(packMatrix(Float64Array.from(values))),
			censored: Buffer.from(packFlags(flags))
		})
	);
}
