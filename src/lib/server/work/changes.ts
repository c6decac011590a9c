import { sql } from 'drizzle-orm';
import type { Connection } from '../db/database';

const LOOK_EVERY_MILLISECONDS = 400;

export interface Changes {
	/**
	 * Calls back after something was committed, by whatever process, and when there will be nothing
	 * more to hear; answers how to stop listening.
	 */
	listen(onChange: () => void, onEnd: () => void): () => void;
	stop(): void;
}

/**
 * Notices commits of this process and of others, however many listen: one look a while at what
 * every use case leaves behind, the newest audit row, and at the progress of jobs.
 */
export function watchChanges(db: Connection): Changes {
	const listeners = new Map<
		object,
		{ readonly onChange: () => void; readonly onEnd: () => void }
	>();
	let seen: string | undefined;
	let timer: NodeJS.Timeout | undefined;
	let isStopped = false;

	async function look(): Promise<void> {
		const now = await stateOf(db).catch(() => seen);
		if (isStopped) return;
		if (seen !== undefined && now !== seen)
			for (const { onChange } of listeners.values()) onChange();
		seen = now;
		timer = listeners.size > 0 ? setTimeout(() => void look(), LOOK_EVERY_MILLISECONDS) : undefined;
	}

	return {
		listen(onChange, onEnd) {
			if (isStopped) {
				onEnd();
				return () => undefined;
			}
			const key = {};
			listeners.set(key, { onChange, onEnd });
			timer ??= setTimeout(() => void look(), 0);
			return () => listeners.delete(key);
		},
		stop() {
			isStopped = true;
			clearTimeout(timer);
			for (const { onEnd } of [...listeners.values()]) onEnd();
			listeners.clear();
		}
	};
}

async function stateOf(db: Connection): Promise<string> {
	const [row] = await db.all<{ state: string }>(sql`
		select (select coalesce(max(seq), 0) from audit) || ' ' ||
			(select coalesce(group_concat(id || state || coalesce(progress, '')), '')
				from job where state in ('queued', 'running')) || ' ' ||
			(select coalesce(max(id), 0) from job) as state`);
	return row?.state ?? '';
}
