/** Roles of the tag tree, as PDF names them. */
export type Role =
	| 'Document'
	| 'Sect'
	| 'H1'
	| 'H2'
	| 'H3'
	| 'P'
	| 'L'
	| 'LI'
	| 'Lbl'
	| 'LBody'
	| 'Table'
	| 'TR'
	| 'TH'
	| 'TD'
	| 'Figure'
	| 'Caption'
	| 'Note'
	| 'Link'
	| 'Span';

export interface NodeDetails {
	/** What a header cell is the head of. */
	readonly scope?: 'Row' | 'Column';
	readonly columnSpan?: number;
	readonly rowSpan?: number;
	/** What a figure shows, in words. */
	readonly alternative?: string;
	/** Text that stands for content which has none. */
	readonly actualText?: string;
}

export interface StructureNode extends NodeDetails {
	readonly role: Role;
	readonly parent: number | null;
}

/** Grows the tag tree while a document is laid out. A node is its index. */
export class Structure {
	readonly #nodes: StructureNode[] = [{ role: 'Document', parent: null }];

	/** The document itself. */
	readonly root = 0;

	add(role: Role, parent: number, details: NodeDetails = {}): number {
		return this.#nodes.push({ role, parent, ...details }) - 1;
	}

	get nodes(): readonly StructureNode[] {
		return this.#nodes;
	}
}
