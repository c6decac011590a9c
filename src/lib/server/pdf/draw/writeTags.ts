import {
	PDFHexString,
	PDFName,
	PDFNumber,
	type PDFContext,
	type PDFDict,
	type PDFObject,
	type PDFRef
} from 'pdf-lib';
import type { StructureNode } from '../layout/structure';
import type { MarkedContent } from './PageWriter';

export interface TaggedPage {
	readonly ref: PDFRef;
	readonly marked: readonly MarkedContent[];
}

/** Cells may be empty; anything else without content is left out of the tree. */
const MAY_BE_EMPTY = new Set(['TR', 'TH', 'TD']);

/**
 * Writes the tag tree, the way back from marked content to it, and returns the tree's root for the
 * catalogue (ISO 32000-1, 14.7).
 */
export function writeTags(
	context: PDFContext,
	nodes: readonly StructureNode[],
	pages: readonly TaggedPage[]
): PDFRef {
	const content = contentByNode(pages);
	const children = childrenByNode(nodes);
	const kept = keptNodes(nodes, children, content);
	const refs = nodes.map((_, at) => (kept.has(at) ? context.nextRef() : null));
	const root = context.nextRef();

	nodes.forEach((node, at) => {
		const ref = refs[at];
		if (!ref) return;
		const parent = node.parent === null ? root : refs[node.parent];
		const own = content.get(at) ?? [];
		const page = own[0]?.page;
		const kids: PDFObject[] = own.map((stretch) =>
			stretch.page === page
				? PDFNumber.of(stretch.id)
				: context.obj({ Type: 'MCR', Pg: stretch.page, MCID: stretch.id })
		);
		for (const child of children.get(at) ?? []) {
			const kid = refs[child];
			if (kid) kids.push(kid);
		}
		context.assign(
			ref,
			context.obj({
				Type: 'StructElem',
				S: node.role,
				P: parent ?? root,
				K: kids,
				...(page && { Pg: page }),
				...(node.role === 'Note' && { ID: PDFHexString.fromText(`note-${at}`) }),
				...details(context, node)
			})
		);
	});

	const parents = context.obj({
		Nums: pages.flatMap(({ marked }, at) => [
			at,
			context.obj(marked.map(({ node }) => refs[node] ?? root))
		])
	});
	context.assign(
		root,
		context.obj({
			Type: 'StructTreeRoot',
			K: [refs[0] ?? root],
			ParentTree: context.register(parents),
			ParentTreeNextKey: pages.length
		})
	);
	return root;
}

function contentByNode(pages: readonly TaggedPage[]) {
	const content = new Map<number, { page: PDFRef; id: number }[]>();
	for (const { ref, marked } of pages)
		for (const { node, id } of marked) {
			const own = content.get(node) ?? [];
			own.push({ page: ref, id });
			content.set(node, own);
		}
	return content;
}

function childrenByNode(nodes: readonly StructureNode[]) {
	const children = new Map<number, number[]>();
	nodes.forEach(({ parent }, at) => {
		if (parent === null) return;
		const own = children.get(parent) ?? [];
		own.push(at);
		children.set(parent, own);
	});
	return children;
}

function keptNodes(
	nodes: readonly StructureNode[],
	children: ReadonlyMap<number, readonly number[]>,
	content: ReadonlyMap<number, unknown>
): Set<number> {
	const kept = new Set<number>();
	// Children are always added after their parent.
	for (let at = nodes.length - 1; at >= 0; at--) {
		const role = nodes[at]?.role ?? 'Span';
		const hasKids = (children.get(at) ?? []).some((child) => kept.has(child));
		if (at === 0 || content.has(at) || hasKids || MAY_BE_EMPTY.has(role)) kept.add(at);
	}
	return kept;
}

function details(context: PDFContext, node: StructureNode): Record<string, PDFObject> {
	const text = (value: string) => PDFHexString.fromText(value);
	const table: PDFDict | null =
		node.scope === undefined && node.columnSpan === undefined && node.rowSpan === undefined
			? null
			: context.obj({
					O: 'Table',
					...(node.scope !== undefined && { Scope: PDFName.of(node.scope) }),
					...(node.columnSpan !== undefined && { ColSpan: node.columnSpan }),
					...(node.rowSpan !== undefined && { RowSpan: node.rowSpan })
				});
	return {
		...(table && { A: table }),
		...(node.alternative !== undefined && { Alt: text(node.alternative) }),
		...(node.actualText !== undefined && { ActualText: text(node.actualText) }),
		...(node.title !== undefined && { T: text(node.title) })
	};
}
