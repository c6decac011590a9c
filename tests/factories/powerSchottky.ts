import { modelCapacitance } from '$lib/core/junction/capacitanceModel';
import type { Connection } from '$lib/server/db/database';
import { die, product } from '$lib/server/db/schema';
import { write } from '$lib/server/db/write';
import { eq } from 'drizzle-orm';
import { insertAcceptedSet, insertProduct } from './acceptedSet';

/** The power Schottky of the worked case: C = 5 pF + 500 pF (1 + V/1.25)^−½, measured to 400 V. */
export const POWER_LAW = {
	zeroBiasCapacitance: 500e-12,
	junctionPotential: 1.25,
	gradingExponent: 0.5,
	caseCapacitance: 5e-12
} as const;
export const POWER_BIASES = [0, 0.5, 1, 2, 4, 8, 15, 30, 60, 100, 150, 200, 300, 400];
export const POWER_SWEEP_KEY = 'T=25;f=1000000';

/** The junction of the die: the area at which 1/C² says 1 × 10²² m⁻³ in 4H-SiC. */
export const POWER_DIE = {
	area: 1.911e-6,
	material: {
		name: '4H-SiC',
		relativePermittivity: 9.66,
		conductionStates: 1.7e25,
		valenceStates: 2.5e25,
		source: 'for the test'
	},
	conductivity: 'n',
	junction: 'metal-semiconductor'
} as const;

/**
 * Devices about that law whose middle one is the law itself: three lots of five, each capacitance a
 * fixed share off, the same share at every bias, so that the median sweep is the law.
 */
export async function insertPowerSchottky(db: Connection, partNumber: string): Promise<number> {
	const id = await insertProduct(db, partNumber);
	const shares = [-0.02, -0.01, 0, 0.01, 0.02];
	const lots = ['LK26-101', 'LK26-102', 'LK26-103'];
	const devices = lots.flatMap((lot, of) =>
		shares.map((share, i) => ({
			lot,
			wafer: `0${1 + (i % 2)}`,
			name: String(i + 1),
			factor: 1 + share + (of - 1) * 0.005
		}))
	);
	await write(db, async (tx) => {
		const [owner] = await tx.select().from(product).where(eq(product.id, id));
		await tx
			.update(die)
			.set({ facts: POWER_DIE })
			.where(eq(die.id, owner?.die ?? 0));
	});
	await insertAcceptedSet(db, {
		product: id,
		sha256: `power ${partNumber}`.padEnd(64, '0'),
		uncertainty: 0.003,
		devices,
		biases: POWER_BIASES,
		frequency: 1e6,
		picofarads: new Map([
			[
				25,
				Float64Array.from(
					devices.flatMap(({ factor }) =>
						POWER_BIASES.map((bias) => modelCapacitance(POWER_LAW, bias) * factor * 1e12)
					)
				)
			]
		])
	});
	return id;
}
