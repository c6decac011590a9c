import type {
	DatasheetDocument,
	DocumentSection,
	SlotState
} from '../../../core/datasheet/document';
import { documentRows } from '../../../core/datasheet/documentRows';
import type { PublicationRecord } from '../../../core/datasheet/record';
import { arrange } from './arrange';
import { moveBoxes, type Box } from './box';
import { compose, type Composition } from './compose';
import type { DrawnMark } from './drawnMark';
import { runningFoot, runningHead } from './furniture';
import { PAPERS, type Paper } from './paper';
import { PROOF_KEY_HEIGHT, proofKey, proofMarks } from './proofMarks';
import type { AttachedFile } from './sections/prose';
import type { Sheet } from './sheet';
import { Structure, type StructureNode } from './structure';

/** A whole datasheet as placed boxes: plain data, in pt from each page's upper left corner. */
export interface LaidOut {
	readonly paper: Paper;
	readonly pages: readonly { readonly boxes: readonly Box[] }[];
	readonly structure: readonly StructureNode[];
	readonly bookmarks: Composition['bookmarks'];
	/** Where the links of text boxes lead. */
	readonly anchors: Composition['anchors'];
}

/**
 * document + record + drawn charts
 *   → sections of blocks and rows → pages → running heads, feet and proof marks → boxes
 */
export function layoutDatasheet(
	document: DatasheetDocument,
	record: PublicationRecord,
	parts: {
		readonly charts: ReadonlyMap<DocumentSection, readonly DrawnMark[]>;
		readonly attached: readonly AttachedFile[];
	}
): LaidOut {
	const paper = PAPERS[document.organization.paper];
	const structure = new Structure();
	const isProof = record.kind !== 'release';
	const sheet: Sheet = {
		document,
		record,
		structure,
		isProof,
		changed: new Set(record.changedRows),
		states: slotStates(document),
		charts: parts.charts
	};
	const notForRelease = isProof ? structure.add('P', structure.root) : null;
	const sections = arrange(sheet, parts.attached);
	const { pages, bookmarks, anchors } = compose(sections, {
		left: paper.left,
		top: paper.top,
		bottom: paper.bottom,
		firstTop: paper.mastheadTop,
		firstBottom: paper.bottom - (isProof ? PROOF_KEY_HEIGHT : 0)
	});

	return {
		paper,
		structure: structure.nodes,
		bookmarks,
		anchors,
		pages: pages.map((page, at) => ({
			boxes: [
				...proofMarks(document, record, paper, at === 0 ? notForRelease : null),
				...(at === 0 ? [] : runningHead(document, record, paper)),
				...page.boxes,
				...(isProof && at === 0 ? moveBoxes(proofKey(), paper.left, page.end) : []),
				...runningFoot(document, record, paper, { page: at + 1, pages: pages.length })
			]
		}))
	};
}

/** The state of each slot; where its rows differ, that of the row which asks for attention. */
function slotStates(document: DatasheetDocument): Map<string, SlotState> {
	const states = new Map<string, SlotState>();
	for (const { row } of documentRows(document))
		if ((states.get(row.slot) ?? 'bound') === 'bound') states.set(row.slot, row.state);
	return states;
}
