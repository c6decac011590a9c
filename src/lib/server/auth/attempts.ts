import { RateLimiterMemory } from 'rate-limiter-flexible';

export interface Attempts {
	/** Whether this key has no attempt left. */
	isSpent(key: string): Promise<boolean>;
	spend(key: string): Promise<void>;
	/** Gives back what was spent, after a success. */
	forgive(key: string): Promise<void>;
}

/** So many failures for a key within so many seconds; kept in this process. */
export function attempts(points: number, seconds: number): Attempts {
	const limiter = new RateLimiterMemory({ points, duration: seconds });
	return {
		async isSpent(key) {
			const state = await limiter.get(key);
			return state !== null && state.remainingPoints <= 0;
		},
		async spend(key) {
			// Beyond the limit the limiter rejects with its state; the next `isSpent` says so.
			await limiter.consume(key).catch(() => undefined);
		},
		async forgive(key) {
			await limiter.delete(key);
		}
	};
}
