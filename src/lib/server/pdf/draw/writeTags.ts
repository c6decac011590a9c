import {
	PDFHexString,
	PDFName,
	PDFNumber,
	PDFString,
	type PDFContext,
	type PDFDict,
	type PDFObject,
	type PDFRef
} from 'pdf-lib';
import type { StructureNode } from '../layout/structure';
import type { MarkedContent } from './PageWriter';
import type { PageLink } from './writeLinks';

export interface TaggedPage {
	readonly ref: PDFRef;
	readonly marked: readonly MarkedContent[];
	/** In the order of their numbers, which go on after those of the pages. */
	readonly links: readonly PageLink[];
}

/** Cells may be empty; anything else without content is left out of the tree. */
const MAY_BE_EMPTY = new Set(['TR', 'TH', 'TD']);

/** Where something first appears: page after page, stretch after stretch. */
type Position = number;
const PAGE_STEP = 1e6;

interface Stretch {
	readonly page: PDFRef;
	readonly id: number;
	readonly actual: string | null;
	readonly position: Position;
}

/**
 * Writes the tag tree, the way back from marked content to it, and returns the tree's root for the
 * catalogue (ISO 32000-1, 14.7). What belongs to a node stands in the order of its appearance; a
 * symbol within it becomes a span that reads as `V_R`.
 */
export function writeTags(
	context: PDFContext,
	nodes: readonly StructureNode[],
	pages: readonly TaggedPage[]
): PDFRef {
	const content = contentByNode(pages);
	const children = childrenByNode(nodes);
	const links = linksByNode(pages);
	const kept = keptNodes(nodes, children, content);
	const positions = firstPositions(nodes, content);
	const refs = nodes.map((_, at) => (kept.has(at) ? context.nextRef() : null));
	const root = context.nextRef();
	/** The element of each stretch: its node's, or its own span. */
	const owners = new Map<Position, PDFRef>();

	nodes.forEach((node, at) => {
		const ref = refs[at];
		if (!ref) return;
		const parent = node.parent === null ? root : refs[node.parent];
		const own = content.get(at) ?? [];
		const page = own[0]?.page;
		const kids: { readonly position: Position; readonly kid: PDFObject }[] = own.map((stretch) => {
			const owner = stretch.actual === null ? ref : symbolSpan(context, stretch, ref);
			owners.set(stretch.position, owner);
			return {
				position: stretch.position,
				kid: owner === ref ? reference(context, stretch, page) : owner
			};
		});
		for (const { page: on, link } of links.get(at) ?? [])
			kids.push({ position: Infinity, kid: context.obj({ Type: 'OBJR', Pg: on, Obj: link }) });
		for (const child of children.get(at) ?? []) {
			const kid = refs[child];
			if (kid) kids.push({ position: positions.get(child) ?? 0, kid });
		}
		kids.sort((a, b) => a.position - b.position);
		context.assign(
			ref,
			context.obj({
				Type: 'StructElem',
				S: node.role,
				P: parent ?? root,
				K: kids.map(({ kid }) => kid),
				...(page && { Pg: page }),
				...(node.role === 'Note' && { ID: PDFString.of(`note-${at}`) }),
				...details(context, node)
			})
		);
	});

	const allLinks = pages.flatMap((page) => page.links);
	const parents = context.obj({
		Nums: [
			...pages.flatMap(({ marked }, at) => [
				at,
				context.obj(marked.map(({ id }) => owners.get(at * PAGE_STEP + id) ?? root))
			]),
			...allLinks.flatMap(({ node }, at) => [pages.length + at, refs[node] ?? root])
		]
	});
	context.assign(
		root,
		context.obj({
			Type: 'StructTreeRoot',
			K: [refs[0] ?? root],
			ParentTree: context.register(parents),
			ParentTreeNextKey: pages.length + allLinks.length
		})
	);
	return root;
}

/** A stretch as its element refers to it: by number on the element's page, else with the page. */
const reference = (context: PDFContext, { page, id }: Stretch, own: PDFRef | undefined) =>
	page === own ? PDFNumber.of(id) : context.obj({ Type: 'MCR', Pg: page, MCID: id });

const symbolSpan = (context: PDFContext, stretch: Stretch, parent: PDFRef): PDFRef =>
	context.register(
		context.obj({
			Type: 'StructElem',
			S: 'Span',
			P: parent,
			Pg: stretch.page,
			K: stretch.id,
			ActualText: PDFHexString.fromText(stretch.actual ?? '')
		})
	);

function linksByNode(pages: readonly TaggedPage[]) {
	const links = new Map<number, { readonly page: PDFRef; readonly link: PDFRef }[]>();
	for (const page of pages)
		for (const { node, ref } of page.links)
			links.set(node, [...(links.get(node) ?? []), { page: page.ref, link: ref }]);
	return links;
}

function contentByNode(pages: readonly TaggedPage[]): Map<number, Stretch[]> {
	const content = new Map<number, Stretch[]>();
	pages.forEach(({ ref, marked }, page) => {
		for (const { node, id, actual } of marked) {
			const own = content.get(node) ?? [];
			own.push({ page: ref, id, actual, position: page * PAGE_STEP + id });
			content.set(node, own);
		}
	});
	return content;
}

/** First appearance of each node with all below it; an empty cell follows the one before it. */
function firstPositions(
	nodes: readonly StructureNode[],
	content: ReadonlyMap<number, readonly Stretch[]>
): Map<number, Position> {
	const positions = new Map<number, Position>();
	// Children are always added after their parent: from the last to the first, each reports upwards.
	for (let at = nodes.length - 1; at >= 0; at--) {
		const own = content.get(at)?.[0]?.position ?? Infinity;
		const first = Math.min(own, positions.get(at) ?? Infinity);
		positions.set(at, first);
		const parent = nodes[at]?.parent ?? null;
		if (parent !== null && first < (positions.get(parent) ?? Infinity))
			positions.set(parent, first);
	}
	const before = new Map<number | null, Position>();
	nodes.forEach(({ parent }, at) => {
		const own = positions.get(at) ?? Infinity;
		const position = own === Infinity ? (before.get(parent) ?? 0) : own;
		positions.set(at, position);
		before.set(parent, position);
	});
	return positions;
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
		...(node.actualText !== undefined && { ActualText: text(node.actualText) })
	};
}
