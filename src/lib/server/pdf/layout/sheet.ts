import type {
	DatasheetDocument,
	DocumentSection,
	SlotState
} from '../../../core/datasheet/document';
import type { PublicationRecord } from '../../../core/datasheet/record';
import type { TextPiece } from './box';
import type { DrawnMark } from './drawnMark';
import type { Structure } from './structure';
import { STYLES } from './styles';
import type { StateLabel } from './table';
import { superscript } from './typeset';

export type SectionOf<Kind extends DocumentSection['kind']> = Extract<
	DocumentSection,
	{ kind: Kind }
>;

/** What every section of a sheet is laid out from. */
export interface Sheet {
	readonly document: DatasheetDocument;
	readonly record: PublicationRecord;
	readonly structure: Structure;
	/** A proof shows the states of slots and marks bound digits; a release never does. */
	readonly isProof: boolean;
	readonly changed: ReadonlySet<string>;
	/** State of each slot that a row of the document has. */
	readonly states: ReadonlyMap<string, SlotState>;
	/** Charts already drawn, by the section they belong to. */
	readonly charts: ReadonlyMap<DocumentSection, readonly DrawnMark[]>;
}

/** The word in a box for a slot's state on a proof; `null` where there is nothing to say. */
const STATE_LABELS = {
	bound: null,
	unbound: { text: 'unbound', isDashed: true },
	stale: { text: 'stale', isDashed: false },
	overridden: { text: 'overridden', isDashed: false },
	unsupported: { text: 'unsupported', isDashed: true },
	'struck out': { text: 'struck out', isDashed: false }
} as const satisfies Record<SlotState, StateLabel | null>;

export const stateLabel = (sheet: Sheet, state: SlotState | undefined): StateLabel | null =>
	sheet.isProof && state !== undefined ? STATE_LABELS[state] : null;

/** Which numbers carry the mark of a sheet that isn't a production one, and what the mark is. */
export const STATUS_MARKS = {
	production: null,
	preliminary: { mark: 'p', word: 'provisional', marksTypical: false },
	target: { mark: 't', word: 'target', marksTypical: true }
} as const;

/** The superscript after a limit, or after a typical value. */
export function statusMark(sheet: Sheet, of: 'limit' | 'typical'): TextPiece | null {
	const status = STATUS_MARKS[sheet.document.status];
	if (status === null || (of === 'typical' && !status.marksTypical)) return null;
	return superscript(status.mark, STYLES.bodyBold);
}
