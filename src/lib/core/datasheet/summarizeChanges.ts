import type { Change, ChangeKind } from './change';

const SINGLE = {
	loosened: 'limit loosened',
	removed: 'entry removed',
	rating: 'rating changed',
	tightened: 'limit tightened',
	added: 'entry added',
	moved: 'typical value moved',
	text: 'text changed'
} as const satisfies Record<ChangeKind, string>;

const SEVERAL = {
	loosened: 'limits loosened',
	removed: 'entries removed',
	rating: 'ratings changed',
	tightened: 'limits tightened',
	added: 'entries added',
	moved: 'typical values moved',
	text: 'texts changed'
} as const satisfies Record<ChangeKind, string>;

/** The changes in one line for the revision history, weightiest first; a person may reword it. */
export function summarizeChanges(changes: readonly Change[]): string {
	const kinds = [...new Set(changes.map(({ kind }) => kind))];
	const parts = kinds.map((kind) => {
		const count = changes.filter((change) => change.kind === kind).length;
		return `${count} ${count === 1 ? SINGLE[kind] : SEVERAL[kind]}`;
	});
	return parts.length === 0 ? 'No change in content.' : `${parts.join(', ')}.`;
}
