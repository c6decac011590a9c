/**
 * The three state machines, kept apart (product.md): a draft stays open whatever becomes of what
 * was submitted from it; a revision is one frozen submission; a release is what the world sees.
 */

export type DraftState = 'open';
export type DraftEvent = 'edit' | 'submit' | 'receiveReturn';

export type RevisionState = 'inReview' | 'approved' | 'published' | 'returned';
export type RevisionEvent = 'approve' | 'return' | 'publish';

export type ReleaseState = 'scheduled' | 'current' | 'superseded' | 'withdrawn';
export type ReleaseEvent = 'becomeEffective' | 'supersede' | 'withdraw' | 'reinstate';

type Table<State extends string, Event extends string> = Record<
	State,
	Partial<Record<Event, State>>
>;

export const DRAFT_TRANSITIONS = {
	open: { edit: 'open', submit: 'open', receiveReturn: 'open' }
} as const satisfies Table<DraftState, DraftEvent>;

/** An approved revision can still be sent back; a published or returned one is history. */
export const REVISION_TRANSITIONS = {
	inReview: { approve: 'approved', return: 'returned' },
	approved: { publish: 'published', return: 'returned' },
	published: {},
	returned: {}
} as const satisfies Table<RevisionState, RevisionEvent>;

/**
 * A scheduled release that a higher version overtook before its day is superseded without ever
 * having been current. Reinstating goes back to scheduled: the day and the versions beside it decide
 * what it is from there (`settleReleases`). A superseded release never becomes current again.
 */
export const RELEASE_TRANSITIONS = {
	scheduled: { becomeEffective: 'current', supersede: 'superseded', withdraw: 'withdrawn' },
	current: { supersede: 'superseded', withdraw: 'withdrawn' },
	superseded: { withdraw: 'withdrawn' },
	withdrawn: { reinstate: 'scheduled' }
} as const satisfies Table<ReleaseState, ReleaseEvent>;

/** A revision that nobody has decided to the end: a product has at most one. */
export const OPEN_REVISION_STATES = ['inReview', 'approved'] as const satisfies RevisionState[];

/** How a state is written for people. */
export const REVISION_STATE_WORDS = {
	inReview: 'in review',
	approved: 'approved',
	published: 'published',
	returned: 'returned'
} as const satisfies Record<RevisionState, string>;

export const RELEASE_STATE_WORDS = {
	scheduled: 'scheduled',
	current: 'current',
	superseded: 'superseded',
	withdrawn: 'withdrawn'
} as const satisfies Record<ReleaseState, string>;

/** Where an event leads, or `undefined` when the machine doesn't allow it there. */
export function nextRevisionState(
	state: RevisionState,
	event: RevisionEvent
): RevisionState | undefined {
	const row: Partial<Record<RevisionEvent, RevisionState>> = REVISION_TRANSITIONS[state];
	return row[event];
}

/** Where an event leads, or `undefined` when the machine doesn't allow it there. */
export function nextReleaseState(
	state: ReleaseState,
	event: ReleaseEvent
): ReleaseState | undefined {
	const row: Partial<Record<ReleaseEvent, ReleaseState>> = RELEASE_TRANSITIONS[state];
	return row[event];
}
