import { RateLimiterMemory } from 'rate-limiter-flexible';

export interface Attempts {
	/** Whether this key has no attempt left. */
	isSpent(key: string): Promise<boolean>;
	/** Takes one attempt; answers whether there was one left. */
	spend(key: string): Promise<boolean>;
	/** Gives one attempt back. */
	giveBack(key: string): Promise<void>;
	/** Forgets everything about the key, after a success. */
	forgive(key: string): Promise<void>;
}

/**
 * So many attempts for a key within so many seconds. They are kept in the memory of this process:
 * in the database every guess would cost a write, and strangers could keep its one writer busy.
 * Several processes allow as many times more, and a restart forgets.
 */
export function attempts(points: number, seconds: number): Attempts {
	const limiter = new RateLimiterMemory({ points, duration: seconds });
	return {
		async isSpent(key) {
			const state = await limiter.get(key);
			return state !== null && state.remainingPoints <= 0;
		},
		spend: (key) =>
			limiter.consume(key).then(
				() => true,
				() => false
			),
		async giveBack(key) {
			await limiter.reward(key);
		},
		async forgive(key) {
			await limiter.delete(key);
		}
	};
}
