import { createWriteStream } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { parseArgs } from 'node:util';
import { demoFiles, electricalFiles } from './generator/demoFiles';
import { encodeLines } from './generator/encodeLines';
import { largeFileLines } from './generator/largeFile';

const USAGE = 'usage: npm run generate -- --out DIR [--points 3300000]';

/** Writes the demo's CSV files into a folder, or with `--points` one file of that many readings. */
async function generate(): Promise<void> {
	const { values } = parseArgs({
		options: { out: { type: 'string' }, points: { type: 'string' } }
	});
	const points = values.points === undefined ? undefined : Number(values.points);
	if (
		values.out === undefined ||
		(points !== undefined && !(Number.isInteger(points) && points > 0))
	) {
		console.error(USAGE);
		process.exitCode = 2;
		return;
	}
	await mkdir(values.out, { recursive: true });
	if (points !== undefined) {
		await writeLines(join(values.out, `LKT-1130_${points}-points.csv`), largeFileLines(points));
		return;
	}
	for (const file of [...demoFiles(), ...electricalFiles()]) {
		await writeLines(join(values.out, file.fileName), file.lines());
	}
}

async function writeLines(path: string, lines: Iterable<string>): Promise<void> {
	await pipeline(Readable.from(encodeLines(lines)), createWriteStream(path));
	console.log(path);
}

await generate();
