import { pino } from 'pino';
import type { Logger } from 'pino';

export type Log = Logger;

/** One JSON line an event on standard output; what could be a secret is never part of it. */
export function openLog(level: string): Log {
	return pino({
		level,
		base: null,
		timestamp: pino.stdTimeFunctions.isoTime,
		redact: {
			paths: ['password', '*.password', 'token', '*.token', '*.authorization', '*.cookie'],
			censor: 'withheld'
		}
	});
}
