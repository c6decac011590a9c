import type { LimitedCase } from '$lib/core/limits/limitations';
import type { RandomSource } from '$lib/core/stats/randomSource';

export type StudiedMethod = Exclude<LimitedCase['method'], 'sigma'>;

/** What is promised: one limit, both each on its own, or the content between both. */
export type StudiedPromise = 'one limit' | 'each' | 'between';

/** A population, a design and a method, of which samples are simulated. */
export interface Study {
	readonly method: StudiedMethod;
	readonly promises: readonly StudiedPromise[];
	readonly shape: string;
	readonly lotSizes: readonly number[];
	readonly lotShare: number;
	/** Simulations, where fewer than asked for must do. */
	readonly atMost?: number;
	/** Draws one sample and says for each promise whether its limits keep the content. */
	readonly simulate: (random: RandomSource) => () => readonly boolean[];
}

/** The promise all studies are made for. */
export const PROMISE = { content: 0.99, confidence: 0.95 } as const;

/** γ of each of two limits promised at once. */
export const SHARED_CONFIDENCE = (1 + PROMISE.confidence) / 2;

/** What came out for one promise. */
export interface Cell extends Pick<Study, 'method' | 'shape' | 'lotSizes' | 'lotShare'> {
	readonly promise: StudiedPromise;
	readonly confidence: number;
	readonly standardError: number;
	readonly simulations: number;
}

/** Share of simulated samples whose limits keep the content. */
export function runStudy(study: Study, simulations: number, random: RandomSource): Cell[] {
	const { method, shape, lotSizes, lotShare } = study;
	const count = Math.min(simulations, study.atMost ?? simulations);
	const next = study.simulate(random);
	const kept = study.promises.map(() => 0);
	for (let i = 0; i < count; i++) {
		const holds = next();
		for (let p = 0; p < kept.length; p++) if (holds[p] === true) kept[p]! += 1;
	}
	return study.promises.map((promise, p) => {
		const confidence = kept[p]! / count;
		return {
			method,
			shape,
			lotSizes,
			lotShare,
			promise,
			confidence,
			standardError: Math.sqrt((confidence * (1 - confidence)) / count),
			simulations: count
		};
	});
}
