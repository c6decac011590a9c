import type { LimitRow } from '../limits/limit';
import type { PolicyVersion } from '../limits/policy';
import type { Organization } from '../organization';
import type { ProductClass, Template } from '../template/template';
import type { Binding, BoundTexts } from './binding';
import type { Part } from './boundTexts';
import type { ChartCurve, DatasheetDocument, DatasheetStatus, SlotState } from './document';

/** All that a datasheet is made of, by value. */
export interface ResolveInput {
	readonly template: Template;
	/** Number of the template's version. */
	readonly templateNumber: number;
	readonly status: DatasheetStatus;
	readonly product: {
		readonly partNumber: string;
		readonly productClass: ProductClass;
		readonly package: string;
		readonly description: string;
	};
	readonly orderingCodes: readonly {
		readonly code: string;
		readonly grade: string;
		readonly marking: string;
		readonly packing: string;
		readonly quantity: number;
	}[];
	readonly organization: Pick<Organization, 'name' | 'paper' | 'language' | 'notice'>;
	readonly bindings: ReadonlyMap<string, Binding>;
	/** Texts by block. */
	readonly texts: ReadonlyMap<string, string>;
	/**
	 * What the measurements say now, by slot: one row for a characteristic, one a bias for a table,
	 * each by the policy of its binding, or by that of the draft where nothing is bound.
	 */
	readonly limits: ReadonlyMap<string, readonly LimitRow[]>;
	/** Families of measured curves, by the key a chart names them with; none is stored without this. */
	readonly curves?: ReadonlyMap<string, readonly ChartCurve[]>;
	/** Every policy version that the rows name. */
	readonly policies: ReadonlyMap<number, PolicyVersion>;
}

export type PrintedTexts = Pick<BoundTexts, 'unit' | 'minimum' | 'typical' | 'maximum'>;

/** A place of the datasheet as the draft's list shows it. */
export interface SlotView {
	/** Id of the row in the document: the slot, with the bias for a row of a table. */
	readonly id: string;
	readonly slot: string;
	/** Reverse bias in V of a row of a table, else `null`. */
	readonly bias: number | null;
	/** Index of the template's section it stands in. */
	readonly section: number;
	readonly kind: 'limit' | 'rating';
	/** `C_tot at V_R = 4 V`, with symbols as plain text. */
	readonly label: string;
	readonly state: SlotState;
	readonly essential: boolean;
	/** Which numbers of a limit the template asks for; empty for a rating. */
	readonly required: readonly Part[];
	/** What it prints, digits as they were computed or typed. */
	readonly prints: PrintedTexts | null;
	/** What the newest measurements would print, where they say anything. */
	readonly current: BoundTexts | null;
	readonly binding: Exclude<Binding, { kind: 'table' }> | null;
	/** What is wrong with it, or why nothing can be bound; `null` when all is well. */
	readonly problem: string | null;
	/** What the engine remarks about the numbers as they are now. */
	readonly warnings: readonly string[];
}

/** Something that submitting needs settled first. */
export interface DraftProblem {
	/** Id of the slot's row, or the text block. */
	readonly place: string;
	/** What it is called on the screen. */
	readonly label: string;
	readonly message: string;
	/** Where in the text block the trouble starts, counted in characters from 0. */
	readonly position?: number;
}

export interface Resolved {
	/** What a proof shows: open places are there, marked by their state. */
	readonly proof: DatasheetDocument;
	/** What submitting freezes: only what is printed, no open or struck-out place. */
	readonly document: DatasheetDocument;
	/** Every slot in the template's order. */
	readonly slots: readonly SlotView[];
	/** The slots that are unbound, stale or unsupported. */
	readonly open: readonly SlotView[];
	/** What submission refuses, in the document's order; empty when it may be submitted. */
	readonly problems: readonly DraftProblem[];
}
