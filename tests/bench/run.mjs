/*
 * Benchmarks, part by part: `npm run bench` runs all of them, `npm run bench -- engine` one. A part
 * is a module beside this one that exports `run`, which prints its figures and returns the targets
 * that were missed.
 */
const PARTS = ['engine'];

const wanted = process.argv.slice(2);
const unknown = wanted.filter((name) => !PARTS.includes(name));
if (unknown.length > 0) {
	process.stderr.write(`bench: no part ${unknown.join(', ')}; there are ${PARTS.join(', ')}\n`);
	process.exit(2);
}

const missed = [];
for (const name of wanted.length > 0 ? wanted : PARTS) {
	process.stdout.write(`${name}\n`);
	const { run } = await import(`./${name}.mjs`);
	try {
		missed.push(...(await run()));
	} catch (problem) {
		missed.push(`${name}: ${problem.message}`);
	}
}
for (const target of missed) process.stderr.write(`missed: ${target}\n`);
process.stdout.write(
	`bench: ${missed.length === 0 ? 'all targets met' : `${missed.length} missed`}\n`
);
process.exitCode = missed.length === 0 ? 0 : 1;
