import { nextReleaseState, type ReleaseEvent, type ReleaseState } from './states';

/** A release as far as its state depends on it. */
export interface SettledRelease {
	readonly id: number;
	readonly major: number;
	readonly minor: number;
	/** ISO date of the first day it is in force, UTC. */
	readonly effectiveFrom: string;
	readonly state: ReleaseState;
}

export interface ReleaseMove {
	readonly id: number;
	readonly event: ReleaseEvent;
	readonly to: ReleaseState;
}

/**
 * What the calendar does to the releases of one product: of the current one and the scheduled ones
 * whose day has come, the highest version is current and the others are superseded. Withdrawing the
 * current one brings no older one back: an older promise comes back by a person's decision only.
 *
 * @param today ISO date, UTC
 */
export function settleReleases(releases: readonly SettledRelease[], today: string): ReleaseMove[] {
	const inForce = releases
		.filter(
			({ state, effectiveFrom }) =>
				state === 'current' || (state === 'scheduled' && effectiveFrom <= today)
		)
		.toSorted((a, b) => b.major - a.major || b.minor - a.minor);

	return inForce.flatMap((release, place): ReleaseMove[] => {
		if (place === 0 && release.state === 'current') return [];
		const event: ReleaseEvent = place === 0 ? 'becomeEffective' : 'supersede';
		const to = nextReleaseState(release.state, event);
		return to === undefined ? [] : [{ id: release.id, event, to }];
	});
}

/** The releases as they stand today, whether or not somebody has written the moves down yet. */
export function releasesOn<R extends SettledRelease>(releases: readonly R[], today: string): R[] {
	const moves = new Map(settleReleases(releases, today).map(({ id, to }) => [id, to]));
	return releases.map((release) => ({ ...release, state: moves.get(release.id) ?? release.state }));
}
