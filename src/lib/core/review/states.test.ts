import { describe, expect, it } from 'vitest';
import {
	DRAFT_TRANSITIONS,
	nextReleaseState,
	nextRevisionState,
	RELEASE_TRANSITIONS,
	REVISION_TRANSITIONS,
	type ReleaseEvent,
	type ReleaseState,
	type RevisionEvent,
	type RevisionState
} from './states';

const REVISION_EVENTS: RevisionEvent[] = ['approve', 'return', 'publish'];
const RELEASE_EVENTS: ReleaseEvent[] = ['becomeEffective', 'supersede', 'withdraw', 'reinstate'];

/** product.md, *Three state machines*: written out by hand; what isn't here is refused. */
const REVISION: [RevisionState, RevisionEvent, RevisionState | undefined][] = [
	['inReview', 'approve', 'approved'],
	['inReview', 'return', 'returned'],
	['inReview', 'publish', undefined],
	['approved', 'approve', undefined],
	['approved', 'return', 'returned'],
	['approved', 'publish', 'published'],
	['published', 'approve', undefined],
	['published', 'return', undefined],
	['published', 'publish', undefined],
	['returned', 'approve', undefined],
	['returned', 'return', undefined],
	['returned', 'publish', undefined]
];

const RELEASE: [ReleaseState, ReleaseEvent, ReleaseState | undefined][] = [
	['scheduled', 'becomeEffective', 'current'],
	['scheduled', 'supersede', 'superseded'],
	['scheduled', 'withdraw', 'withdrawn'],
	['scheduled', 'reinstate', undefined],
	['current', 'becomeEffective', undefined],
	['current', 'supersede', 'superseded'],
	['current', 'withdraw', 'withdrawn'],
	['current', 'reinstate', undefined],
	['superseded', 'becomeEffective', undefined],
	['superseded', 'supersede', undefined],
	['superseded', 'withdraw', 'withdrawn'],
	['superseded', 'reinstate', undefined],
	['withdrawn', 'becomeEffective', undefined],
	['withdrawn', 'supersede', undefined],
	['withdrawn', 'withdraw', undefined],
	['withdrawn', 'reinstate', 'scheduled']
];

describe('a revision', () => {
	it.each(REVISION)('%s, %s → %s', (state, event, next) => {
		expect(nextRevisionState(state, event)).toBe(next);
	});

	it('has every state and event in the table above', () => {
		expect(REVISION).toHaveLength(
			Object.keys(REVISION_TRANSITIONS).length * REVISION_EVENTS.length
		);
	});
});

describe('a release', () => {
	it.each(RELEASE)('%s, %s → %s', (state, event, next) => {
		expect(nextReleaseState(state, event)).toBe(next);
	});

	it('has every state and event in the table above', () => {
		expect(RELEASE).toHaveLength(Object.keys(RELEASE_TRANSITIONS).length * RELEASE_EVENTS.length);
	});
});

it('leaves a draft open whatever becomes of what was submitted from it', () => {
	expect(new Set(Object.values(DRAFT_TRANSITIONS.open))).toEqual(new Set(['open']));
});
