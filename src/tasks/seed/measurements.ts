import { Readable } from 'node:stream';
import { requestedMapping } from '$lib/core/measurements/requestedMapping';
import type { MeasurementSetup } from '$lib/core/measurements/setup';
import { findProductByPartNumber } from '$lib/server/db/findProductByPartNumber';
import { listMeasurementSets } from '$lib/server/db/listMeasurementSets';
import { listSuspects } from '$lib/server/db/listSuspects';
import { giveVerdict } from '$lib/server/services/giveVerdict';
import { mapUpload } from '$lib/server/services/mapUpload';
import { receiveUpload } from '$lib/server/services/receiveUpload';
import type { Stores } from '$lib/server/work/stores';
import { demoFiles, electricalFiles } from '../generator/demoFiles';
import type { DemoFile } from '../generator/demoFiles';
import { encodeLines } from '../generator/encodeLines';
import { must } from './must';

/** How sweeps of the capacitance were measured, and how everything else. */
const BRIDGE = {
	instrument: 'LCR bridge, four-wire fixture',
	signalLevelVolts: 0.05,
	uncertainty: 0.003
};
const PARAMETRIC = { instrument: 'Parametric tester, four-wire fixture', uncertainty: 0.002 };

/** Works the queue off; given by the seed, so that it can show what is going on. */
export type WorkOff = () => Promise<void>;

/** Uploads the demo's files, maps them as they were recognised, and imports them. */
export async function seedMeasurements(
	stores: Stores,
	by: string,
	workOff: WorkOff
): Promise<void> {
	for (const file of demoFiles()) await seedFile(stores, { file, setup: BRIDGE, by }, workOff);
	for (const file of electricalFiles()) {
		await seedFile(stores, { file, setup: PARAMETRIC, by }, workOff);
	}
}

async function seedFile(
	stores: Stores,
	{
		file,
		setup,
		by
	}: {
		readonly file: DemoFile;
		readonly setup: Partial<MeasurementSetup>;
		readonly by: string;
	},
	workOff: WorkOff
): Promise<void> {
	const received = await receiveUpload(stores, {
		partNumber: file.partNumber,
		fileName: file.fileName,
		body: Readable.from(encodeLines(file.lines())),
		by
	});
	if (received.status === 'refused' && received.why === 'duplicate') return;
	const { upload } = must(received, 'received');
	await workOff();
	must(
		await mapUpload(stores, { upload, request: requestedMapping.parse({ setup }), by }),
		'mapped'
	);
	await workOff();
}

/** Excludes what the suspect rule found in the tuning diode's sets: contacts that were lost. */
export async function seedVerdicts(
	stores: Stores,
	partNumber: string,
	by: string,
	workOff: WorkOff
): Promise<void> {
	const product = await findProductByPartNumber(stores.db, partNumber);
	if (product === undefined) return;
	for (const set of await listMeasurementSets(stores.db, product.id)) {
		for (const { device, conditionKey, verdicts } of await listSuspects(stores.db, set.id)) {
			if (verdicts.length > 0) continue;
			const reason = 'Contact fault: the trace of the prober shows the needle off the pad.';
			must(
				await giveVerdict(stores, {
					set: set.id,
					device,
					conditionKey,
					decision: 'exclude',
					reason,
					by
				}),
				'given'
			);
		}
	}
	await workOff();
}
