/*
 * Every check of the project, from a fresh clone: tools → install → format, lint, types → build →
 * unit and integration → browser. The last line counts all of them; nothing is skipped in silence.
 */
import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, alone, build, install, run, step } from '../src/tasks/steps.mjs';

const WORK = join(ROOT, 'tests/.work');

/** Programs the tests need, and the Debian package each comes in. */
const TOOLS = {
	chromium: 'chromium',
	pdftotext: 'poppler-utils',
	pdftoppm: 'poppler-utils',
	qpdf: 'qpdf',
	mutool: 'mupdf-tools',
	ngspice: 'ngspice'
};

const totals = { passed: 0, failed: 0, skipped: 0 };

const isThere = (program) => spawnSync('sh', ['-c', `command -v ${program}`]).status === 0;

async function installTools() {
	const wanted = [
		...new Set(
			Object.entries(TOOLS).flatMap(([program, owner]) => (isThere(program) ? [] : [owner]))
		)
	];
	if (wanted.length > 0) {
		const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
		const asRoot = process.getuid?.() === 0 ? [] : ['sudo'];
		const apt = (...args) => {
			const [command, ...rest] = [...asRoot, 'apt-get', '-qq', ...args];
			return run(command, rest, { env, quiet: true });
		};
		await apt('update');
		await apt('install', '-y', '--no-install-recommends', ...wanted);
	}
	const missing = Object.keys(TOOLS).filter((program) => !isThere(program));
	if (missing.length > 0) {
		throw new Error(`${missing.join(', ')} not found; install ${wanted.join(' ')} from Debian`);
	}
}

/** A check that is one thing: it passes or fails as a whole. */
async function check(name, command, args) {
	await step(name, async () => {
		try {
			await run(command, args);
			totals.passed += 1;
		} catch (problem) {
			process.stderr.write(`${name}: ${problem.message}\n`);
			totals.failed += 1;
		}
	});
}

/** A suite writes a report of its own; a suite that wrote none has failed. */
async function suite(name, args, report, count) {
	const path = join(WORK, report);
	await step(name, async () => {
		const ended = await run('npx', ['--no-install', ...args]).then(
			() => true,
			() => false
		);
		if (!existsSync(path)) {
			totals.failed += 1;
			process.stderr.write(`${name}: no report was written\n`);
			return;
		}
		const { passed, failed, skipped } = count(JSON.parse(readFileSync(path, 'utf8')));
		totals.passed += passed;
		totals.failed += failed;
		totals.skipped += skipped;
		if (!ended && failed === 0) totals.failed += 1;
		if (passed === 0) totals.failed += 1;
	});
}

async function formatAndLint() {
	await check('Format', 'npx', ['--no-install', 'prettier', '--check', '--log-level=warn', '.']);
	await check('Lint', 'npx', ['--no-install', 'eslint', '.', '--max-warnings=0']);
}

async function typesBuildAndTests() {
	await check('Types', 'npx', [
		'--no-install',
		'svelte-check',
		'--tsconfig',
		'./tsconfig.json',
		'--fail-on-warnings',
		'--output',
		'human'
	]);
	await alone(() => step('Build', build));
	await suite(
		'Unit and integration tests',
		[
			'vitest',
			'run',
			'--reporter=dot',
			'--reporter=json',
			'--outputFile.json=tests/.work/vitest.json'
		],
		'vitest.json',
		countVitest
	);
}

const countVitest = (report) => ({
	passed: report.numPassedTests,
	failed:
		report.numFailedTests +
		report.testResults.filter(
			(file) =>
				file.status === 'failed' && file.assertionResults.every((one) => one.status !== 'failed')
		).length,
	skipped: report.numPendingTests + report.numTodoTests
});

const countPlaywright = (report) => ({
	passed: report.stats.expected,
	failed: report.stats.unexpected + report.stats.flaky,
	skipped: report.stats.skipped
});

const start = Date.now();
try {
	rmSync(WORK, { recursive: true, force: true });
	mkdirSync(WORK, { recursive: true });
	await step('Tools', installTools);
	await alone(() => step('Install', install));
	execFileSync('npx', ['--no-install', 'svelte-kit', 'sync'], { cwd: ROOT, stdio: 'ignore' });

	// Two cores: formatting and linting take as long as everything else that needs no browser.
	await Promise.all([formatAndLint(), typesBuildAndTests()]);
	await suite(
		'Browser tests',
		['playwright', 'test', '--config', 'tests/playwright.config.ts'],
		'playwright.json',
		countPlaywright
	);
} catch (problem) {
	process.stderr.write(`verify: ${problem.message}\n`);
	totals.failed += 1;
}

process.stdout.write(`verify took ${((Date.now() - start) / 1000).toFixed(0)} s\n`);
process.stdout.write(
	`verify: ${totals.passed} passed, ${totals.failed} failed, ${totals.skipped} skipped\n`
);
process.exitCode = totals.failed > 0 || totals.skipped > 0 ? 1 : 0;
