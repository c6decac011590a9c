import { spawnSync } from 'node:child_process';
import { mkdirSync, readFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { build } from 'vite';
import { writePackedBlocks } from './packedBlocks.mjs';

const HERE = import.meta.dirname;
const ROOT = resolve(HERE, '../..');
const FOLDER = join(ROOT, 'tests/.work/bench');

/**
 * Both sides in turn, so often; the median counts. Each does the whole work twice in its process: jobs
 * run in a worker that lives on, so the second time is the one that is judged.
 */
const ROUNDS = 3;

/** Debian's Python, with its SciPy; `PYTHON` names another. */
const PYTHON = process.env.PYTHON ?? '/usr/bin/python3';

const TARGETS = { ratio: 0.5, fitMicroseconds: 15, whatIfMilliseconds: 5 };

/**
 * How far the two sides may lie apart, relative. Limits are handed out to twelve digits; those for
 * future lots are compared with quantiles of a hundred thousand draws.
 */
const AGREEMENT = {
	fits: 1e-3,
	means: 1e-12,
	deviations: 1e-10,
	lotComponents: 1e-7,
	darling: 1e-6,
	lots: 5e-3,
	normal: 1e-9,
	order: 1e-11,
	sigma: 1e-11
};

/** One thread and, where the machine can, one core. */
function runAlone(command, args) {
	const pinned = spawnSync('taskset', ['-c', '0', 'true']).status === 0;
	const [program, ...rest] = pinned ? ['taskset', '-c', '0', command, ...args] : [command, ...args];
	const env = { ...process.env, OPENBLAS_NUM_THREADS: '1', OMP_NUM_THREADS: '1' };
	const { status, stderr } = spawnSync(program, rest, { env, encoding: 'utf8' });
	if (status !== 0) throw new Error(`${command} failed: ${stderr}`);
}

const read = (name) => JSON.parse(readFileSync(join(FOLDER, name), 'utf8'));

const total = (spent) => Object.values(spent).reduce((sum, seconds) => sum + seconds, 0);

const median = (values) => values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)];

const largestDifference = (ours, theirs) =>
	ours.reduce(
		(most, value, i) =>
			Math.max(most, Math.abs(value - theirs[i]) / Math.max(Math.abs(theirs[i]), 1e-300)),
		0
	);

function printTimes(ours, theirs) {
	const names = Object.keys(theirs.at(-1).spent);
	const of = (runs, name) => median(runs.map(({ spent }) => spent[name]));
	for (const name of names) {
		const [a, b] = [of(ours, name), of(theirs, name)];
		process.stdout.write(
			`  ${name.padEnd(14)} ${a.toFixed(3)} s, NumPy/SciPy ${b.toFixed(3)} s, ratio ${(a / b).toFixed(2)}\n`
		);
	}
}

/** Limits come from both sides as minimum and maximum of each condition, here in F and there too. */
function compare(ours, theirs) {
	const missed = [];
	for (const [name, allowed] of Object.entries(AGREEMENT)) {
		if (ours[name].length !== theirs[name].length || ours[name].length === 0) {
			missed.push(`${name}: ${ours[name].length} numbers against ${theirs[name].length}`);
			continue;
		}
		const difference = largestDifference(ours[name], theirs[name]);
		process.stdout.write(
			`  ${name.padEnd(14)} ${ours[name].length} numbers differ by at most ${difference.toExponential(1)}\n`
		);
		if (!(difference <= allowed)) missed.push(`${name} differ by more than ${allowed}`);
	}
	return missed;
}

export async function run() {
	if (spawnSync(PYTHON, ['-c', 'import numpy, scipy']).status !== 0)
		throw new Error(`${PYTHON} has no SciPy; install python3-scipy from Debian`);
	mkdirSync(FOLDER, { recursive: true });
	writePackedBlocks(FOLDER);
	await build({
		configFile: false,
		logLevel: 'error',
		publicDir: false,
		resolve: { alias: { $lib: join(ROOT, 'src/lib') } },
		build: {
			ssr: true,
			outDir: join(FOLDER, 'build'),
			emptyOutDir: true,
			target: 'node20',
			rolldownOptions: { input: { engine: join(HERE, 'engine.ts') } }
		}
	});

	const [ours, theirs] = [[], []];
	for (let round = 0; round < ROUNDS; round++) {
		runAlone(process.execPath, [join(FOLDER, 'build/engine.js'), FOLDER]);
		ours.push(read('engine.json'));
		runAlone(PYTHON, [join(HERE, 'reference.py'), FOLDER]);
		theirs.push(read('reference.json'));
	}

	printTimes(ours, theirs);
	const [seconds, reference] = [ours, theirs].map((runs) =>
		median(runs.map(({ spent }) => total(spent)))
	);
	const ratio = seconds / reference;
	const [cold, coldReference] = [ours, theirs].map((runs) =>
		median(runs.map(({ first }) => total(first)))
	);
	const fitMicroseconds = median(ours.map((one) => one.fitMicroseconds));
	process.stdout.write(
		`  first time     ${cold.toFixed(2)} s, NumPy/SciPy ${coldReference.toFixed(2)} s, ratio ${(cold / coldReference).toFixed(2)}\n` +
			`  from then on   ${seconds.toFixed(2)} s, NumPy/SciPy ${reference.toFixed(2)} s, ratio ${ratio.toFixed(2)} (at most ${TARGETS.ratio})\n` +
			`  a fit          ${fitMicroseconds.toFixed(1)} µs (at most ${TARGETS.fitMicroseconds})\n`
	);
	const missed = compare(ours.at(-1).results, theirs.at(-1).results);
	if (!(ratio <= TARGETS.ratio)) missed.push(`ratio ${ratio.toFixed(2)}`);
	if (!(fitMicroseconds <= TARGETS.fitMicroseconds)) missed.push('microseconds a fit');
	for (const method of Object.keys(ours[0].whatIf)) {
		const milliseconds = median(ours.map(({ whatIf }) => whatIf[method]));
		process.stdout.write(
			`  what-if ${method.padEnd(6)} ${milliseconds.toFixed(2)} ms (under ${TARGETS.whatIfMilliseconds})\n`
		);
		if (!(milliseconds < TARGETS.whatIfMilliseconds)) missed.push(`what-if ${method}`);
	}
	return missed;
}
