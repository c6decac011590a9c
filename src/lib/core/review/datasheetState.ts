import type { DatasheetStatus } from '../datasheet/document';
import { versionText } from '../datasheet/record';
import {
	RELEASE_STATE_WORDS,
	REVISION_STATE_WORDS,
	type ReleaseState,
	type RevisionState
} from './states';

/** How far the datasheet of a product has come. */
export interface DatasheetState {
	/** What the world sees: the current release, else the newest of the others. */
	readonly release: {
		readonly major: number;
		readonly minor: number;
		readonly state: ReleaseState;
	} | null;
	readonly openRevision: { readonly number: number; readonly state: RevisionState } | null;
	/** Status of the draft; `null` while there is no draft. */
	readonly draft: DatasheetStatus | null;
}

/** What a table of products can be narrowed to; a product can be in several. */
export const DATASHEET_STAGES = {
	none: 'no datasheet yet',
	draft: 'draft, never submitted',
	inReview: 'in review',
	approved: 'approved, to publish',
	current: 'published'
} as const;
export type DatasheetStage = keyof typeof DATASHEET_STAGES;

/** Whether a datasheet is at a stage. */
export function isAtStage(state: DatasheetState, stage: DatasheetStage): boolean {
	switch (stage) {
		case 'none':
			return state.release === null && state.openRevision === null && state.draft === null;
		case 'draft':
			return state.draft !== null && state.release === null && state.openRevision === null;
		case 'inReview':
		case 'approved':
			return state.openRevision?.state === stage;
		case 'current':
			return state.release?.state === 'current';
		default:
			return stage satisfies never;
	}
}

/** `2.0 current, revision 9 in review`; an open draft is named where nothing further is under way. */
export function datasheetStateText({ release, openRevision, draft }: DatasheetState): string {
	const parts = [
		...(release ? [`${versionText(release)} ${RELEASE_STATE_WORDS[release.state]}`] : []),
		...(openRevision
			? [`revision ${openRevision.number} ${REVISION_STATE_WORDS[openRevision.state]}`]
			: draft === null
				? []
				: ['draft open'])
	];
	return parts.length === 0 ? 'none yet' : parts.join(', ');
}
