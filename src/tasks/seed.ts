import { readConfig } from '$lib/server/config';
import { openDatabase } from '$lib/server/db/client';
import { migrateDatabase } from '$lib/server/db/migrate';
import { ensureDefaults } from '$lib/server/services/ensureDefaults';
import { ensureOrganization } from '$lib/server/services/ensureOrganization';
import { folderStorage } from '$lib/server/storage/folderStorage';
import { handlers } from '$lib/server/work/handlers';
import { runOpenJobs } from '$lib/server/work/runOpenJobs';
import type { Stores } from '$lib/server/work/stores';
import { seedDrafts } from './seed/drafts';
import { seedMeasurements, seedVerdicts } from './seed/measurements';
import { DEMO_EMAILS, DEMO_PASSWORD, seedPeople } from './seed/people';
import { seedProducts } from './seed/products';
import { seedOpenRevision, seedRelease } from './seed/review';

/*
 * Migrates the database and runs the main job as the demo's people: people → products → uploads →
 * distributions → drafts → verification → release. What is there already is left as it is.
 */

async function seed(stores: Stores): Promise<void> {
	const workOff = () => runOpenJobs(stores, handlers);

	await phase('People', async () => {
		await ensureDefaults(stores);
		await seedPeople(stores);
	});
	const people = await seedPeople(stores);
	await phase('Organization and products', async () => {
		await ensureOrganization(stores, {
			settings: { name: 'Larkmoor Semiconductor', libraryIsPublic: true },
			by: people.administrator
		});
		await seedProducts(stores, people.product);
	});
	await phase('Measurements and distributions', async () => {
		await seedMeasurements(stores, people.product, workOff);
		await seedVerdicts(stores, 'LKT-1130', people.product, workOff);
	});
	await phase('Drafts', () => seedDrafts(stores, people));
	await phase('Verification and release', async () => {
		await seedRelease(stores, 'LKT-1130', people, workOff);
		await seedOpenRevision(stores, 'LKR-2406', people, workOff);
	});
	process.stdout.write(`\nThe password of each is ${DEMO_PASSWORD}:\n`);
	for (const { email, name } of DEMO_EMAILS) process.stdout.write(`  ${email}  ${name}\n`);
}

async function phase(name: string, work: () => Promise<void>): Promise<void> {
	const start = performance.now();
	process.stdout.write(`  ${name} … `);
	await work();
	process.stdout.write(`${((performance.now() - start) / 1000).toFixed(1)} s\n`);
}

const config = readConfig(process.env);
const { db, close } = await openDatabase(config.databaseUrl);
try {
	await migrateDatabase(db);
	await seed({ db, storage: folderStorage(config.storageFolder) });
} catch (problem) {
	process.stderr.write(
		`\nseed: ${problem instanceof Error ? (problem.stack ?? problem.message) : String(problem)}\n`
	);
	process.exitCode = 1;
} finally {
	close();
}
