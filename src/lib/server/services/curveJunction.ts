import { conditionKey } from '$lib/core/characteristics/condition';
import type { SweepFits } from '$lib/core/distributions/sweepFits';
import type { DieFacts } from '$lib/core/junction/dieFacts';
import {
	lineSettings,
	medianJunction,
	type MedianJunction,
	type Sweep
} from '$lib/core/junction/medianJunction';
import { medianOf } from '$lib/core/limits/typicalValue';
import type { Connection } from '../db/database';
import { findNewestJob } from '../db/findNewestJob';
import { findProductDie } from '../db/findProductDie';
import { findSweepFits } from '../db/findSweepFits';
import { write } from '../db/write';
import type { CapacitanceCurve } from './capacitanceCurve';
import { enqueueFits, fitsKey } from './fitSweepsJob';

/** How far the fits of a curve's devices are. */
export type FitsState =
	| { readonly status: 'ready'; readonly fits: SweepFits }
	| { readonly status: 'underway' }
	| { readonly status: 'failed'; readonly why: string }
	/** Fewer biases than parameters. */
	| { readonly status: 'none' };

/** What a curve says of the junction below it: sums and medians only, no device. */
export interface CurveJunction {
	readonly sweep: Sweep;
	readonly median: MedianJunction | undefined;
	/** `undefined` where the facts of the die are not complete. */
	readonly die: { readonly name: string; readonly facts: DieFacts } | undefined;
	readonly settings: ReturnType<typeof lineSettings> | undefined;
	readonly fits: FitsState;
}

export async function curveJunction(
	db: Connection,
	product: { readonly id: number; readonly basisHash: string | null },
	curve: CapacitanceCurve
): Promise<CurveJunction> {
	const { temperatureCelsius } = curve;
	const die = await findProductDie(db, product.id);
	const sweep = medianSweep(curve);
	return {
		sweep,
		median: medianJunction(sweep),
		die,
		settings: die && lineSettings(die.facts, temperatureCelsius),
		fits: await fitsState(db, product, curve)
	};
}

/** The medians of a curve at its measured biases, in V and F. */
export function medianSweep({ rows }: Pick<CapacitanceCurve, 'rows'>): Sweep {
	const measured = rows.filter(({ distribution }) => distribution.origin === 'measured');
	return {
		biases: measured.map(({ limit }) => limit.condition.reverseVoltage ?? 0),
		capacitances: measured.map(({ distribution }) => medianOf(distribution))
	};
}

/** The fits as they are; those that nobody asked for yet are asked for. */
async function fitsState(
	db: Connection,
	{ id, basisHash }: { readonly id: number; readonly basisHash: string | null },
	{ temperatureCelsius, frequency }: CapacitanceCurve
): Promise<FitsState> {
	if (basisHash === null) return { status: 'none' };
	const key = conditionKey({
		temperatureCelsius,
		...(frequency === undefined ? {} : { frequency })
	});
	const fits = await findSweepFits(db, { product: id, basisHash, conditionKey: key });
	if (fits !== undefined) return { status: 'ready', fits };
	const job = await findNewestJob(db, fitsKey(id, basisHash));
	if (job?.state === 'done') return { status: 'none' };
	if (job?.state === 'failed') return { status: 'failed', why: job.error ?? '' };
	if (job === undefined) await write(db, (tx) => enqueueFits(tx, id, basisHash));
	return { status: 'underway' };
}
