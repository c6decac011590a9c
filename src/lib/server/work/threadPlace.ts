import { Worker } from 'node:worker_threads';
import type { Log } from '../logging';
import type { JobPlace } from './jobPlace';
import type { FromThread, ThreadSetup } from './threadMessages';

export interface ThreadPlaceSetup {
	/** The built worker. */
	readonly entry: string;
	readonly thread: ThreadSetup;
	readonly log: Log;
}

/** Does jobs in a worker thread, which is opened for the first of them and again after it died. */
export function threadPlace({ entry, thread, log }: ThreadPlaceSetup): JobPlace {
	let worker: Worker | undefined;

	const openThread = (): Worker => {
		const opened = new Worker(entry, { workerData: thread });
		opened.on('error', (problem) => log.error({ err: problem }, 'the worker thread died'));
		opened.on('exit', () => {
			if (worker === opened) worker = undefined;
		});
		return opened;
	};

	return {
		run(job, report) {
			const held = (worker ??= openThread());
			return new Promise((answer) => {
				const hear = (message: FromThread) => {
					if (message.kind === 'progress') report(message.progress);
					if (message.kind === 'end') done(message.end);
				};
				const die = () => done(undefined);
				const done = (end: Extract<FromThread, { kind: 'end' }>['end'] | undefined) => {
					held.off('message', hear);
					held.off('exit', die);
					answer(end);
				};
				held.on('message', hear);
				held.on('exit', die);
				held.postMessage(job);
			});
		},
		async breakOff() {
			await worker?.terminate();
		}
	};
}
