import { writeFile } from 'node:fs/promises';
import { parseArgs } from 'node:util';
import { randomSource } from '$lib/core/stats/randomSource';
import { judge, unseenLimitations } from './confidence/judge';
import { STUDIES } from './confidence/studies';
import { runStudy } from './confidence/study';
import { cellLine, confidenceTable } from './confidence/table';

/*
 * Simulates samples of known populations and counts how often the limits keep what they promise. A
 * cell below the stated confidence by more than 0.01 fails, unless users are told of it.
 */

const USAGE = 'usage: npm run confidence [-- --simulations 10000] [--table FILE]';
const SEED = 20_261_201;

async function confidence(): Promise<void> {
	const { values } = parseArgs({
		options: { simulations: { type: 'string', default: '10000' }, table: { type: 'string' } }
	});
	const simulations = Number(values.simulations);
	if (!(Number.isInteger(simulations) && simulations > 0)) {
		console.error(USAGE);
		process.exitCode = 2;
		return;
	}
	const cells = STUDIES.flatMap((study, i) => {
		const ofStudy = runStudy(study, simulations, randomSource(SEED + i));
		for (const cell of ofStudy) console.log(cellLine(cell));
		return ofStudy;
	});
	const table = confidenceTable(cells);
	console.log(`\n${table}\n`);
	if (values.table !== undefined) await writeFile(values.table, `${table}\n`);

	const short = cells.filter((cell) => judge(cell).status === 'falls short').length;
	const unseen = unseenLimitations(cells);
	for (const name of unseen) console.error(`limitation not seen in any cell: ${name}`);
	console.log(`confidence: ${cells.length - short} of ${cells.length} cells hold or are listed`);
	if (short > 0 || unseen.length > 0) process.exitCode = 1;
}

await confidence();
