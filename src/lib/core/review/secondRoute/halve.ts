const FINEST = 1e-13;
const STEPS = 200;

/**
 * Where an increasing function reaches a level: doubling outwards until the level lies between, then
 * the secant of both ends; an end that stays twice is weighed half (Illinois).
 */
export function whereReached(f: (x: number) => number, level: number): number {
	let [low, high] = [0, 1];
	while (f(high) < level) [low, high] = [high, high * 2];
	while (f(low) > level) [low, high] = [low === 0 ? -1 : low * 2, low];
	let [below, above] = [f(low) - level, f(high) - level];
	let stayed = 0;
	let last = Number.NaN;
	for (let step = 0; step < STEPS; step++) {
		const x = (low * above - high * below) / (above - below);
		if (Math.abs(x - last) <= FINEST * Math.abs(x)) return x;
		last = x;
		const at = f(x) - level;
		if (at === 0) return x;
		if (at < 0) {
			[low, below] = [x, at];
			if (stayed > 0) above /= 2;
			stayed = 1;
		} else {
			[high, above] = [x, at];
			if (stayed < 0) below /= 2;
			stayed = -1;
		}
	}
	return last;
}
