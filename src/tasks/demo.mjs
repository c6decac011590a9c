/*
 * The main job from a fresh clone: install → build → migrate and seed → serve.
 */
import { spawn } from 'node:child_process';
import { createServer } from 'node:net';
import { ROOT, alone, build, install, run, step } from './steps.mjs';

const port = process.env.PORT ?? '3000';
const host = process.env.HOST ?? '127.0.0.1';

const env = {
	...process.env,
	DEMO: '1',
	PORT: port,
	HOST: host,
	ORIGIN: process.env.ORIGIN ?? `http://localhost:${port}`,
	BODY_SIZE_LIMIT: process.env.BODY_SIZE_LIMIT ?? 'Infinity',
	NODE_ENV: 'production'
};

/** Refuses before minutes of work, and not after them. */
function refuseTakenPort() {
	return new Promise((free, taken) => {
		const probe = createServer();
		probe.once('error', (problem) =>
			taken(new Error(`PORT ${port} on ${host} can't be used (${problem.code}); set another PORT`))
		);
		probe.listen(Number(port), host, () => probe.close(() => free(undefined)));
	});
}

/** Passes the signal on and ends as the server ends, so that Ctrl-C and SIGTERM are clean. */
function serve() {
	const server = spawn(process.execPath, ['build'], { cwd: ROOT, env, stdio: 'inherit' });
	for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => server.kill(signal));
	server.on('exit', (code, signal) => {
		process.exitCode = signal === 'SIGINT' || signal === 'SIGTERM' ? 0 : (code ?? 1);
	});
}

try {
	await refuseTakenPort();
	await alone(async () => {
		await step('Install', install);
		await step('Build', build);
	});
	await step('Migrate and seed', () => run(process.execPath, ['build/tasks/seed.js'], { env }));
	process.stdout.write(`\nPlaten serves at ${env.ORIGIN}; Ctrl-C ends it.\n`);
	serve();
} catch (problem) {
	process.stderr.write(`demo: ${problem.message}\n`);
	process.exitCode = 1;
}
