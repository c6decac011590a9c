import { parseArgs } from 'node:util';
import { noSuchPerson } from '$lib/core/messages/people';
import { readConfig } from '$lib/server/config';
import { openDatabase } from '$lib/server/db/client';
import { findPersonByEmail } from '$lib/server/db/findSignedIn';
import { migrateDatabase } from '$lib/server/db/migrate';
import { createToken } from '$lib/server/services/createToken';

/*
 * Prints a personal access token, and nothing else, on standard output.
 */

async function printToken(email: string): Promise<void> {
	const { db, close } = await openDatabase(readConfig(process.env).databaseUrl);
	try {
		await migrateDatabase(db);
		const person = await findPersonByEmail(db, email);
		if (person === undefined) throw new Error(noSuchPerson(email));
		process.stdout.write(
			`${await createToken({ db }, { person: person.id, name: 'command line' })}\n`
		);
	} finally {
		close();
	}
}

try {
	const { values } = parseArgs({ options: { email: { type: 'string' } } });
	if (values.email === undefined) throw new Error('Say whose: --email someone@example.test');
	await printToken(values.email);
} catch (problem) {
	process.stderr.write(`token: ${problem instanceof Error ? problem.message : String(problem)}\n`);
	process.exitCode = 1;
}
