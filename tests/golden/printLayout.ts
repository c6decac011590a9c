import type { Box } from '../../src/lib/server/pdf/layout/box';
import type { LaidOut } from '../../src/lib/server/pdf/layout/layoutDatasheet';

const place = (value: number) => value.toFixed(1);

/** One line a box: what it is, where, in what, and what it says. Drawings give their size only. */
function boxLine(box: Box): string {
	const tag = box.tag === null ? '-' : String(box.tag);
	switch (box.kind) {
		case 'text':
			return `text ${tag} ${place(box.x)} ${place(box.y)} ${box.pieces
				.map(({ face, size, text }) => `${face} ${place(size)} “${text}”`)
				.join(
					' + '
				)}${box.actual === undefined ? '' : ` reads ${box.actual}`}${box.link === undefined ? '' : ` leads to ${box.link}`}`;
		case 'rule':
			return `rule ${tag} ${box.from.map(place).join(' ')} ${box.to.map(place).join(' ')} weight ${box.weight}`;
		case 'rectangle':
			return `rectangle ${tag} ${place(box.x)} ${place(box.y)} ${place(box.width)} × ${place(box.height)}`;
		case 'disc':
			return `disc ${tag} ${place(box.x)} ${place(box.y)} ${box.look}`;
		case 'drawing':
			return `drawing ${tag} ${place(box.x)} ${place(box.y)} ${place(box.width)} × ${place(box.height)}`;
		default:
			return box satisfies never;
	}
}

/** A laid-out datasheet as text that a person can compare: pages, boxes, tag tree, bookmarks. */
export function printLayout({ paper, pages, structure, bookmarks, anchors }: LaidOut): string {
	return [
		`paper ${paper.name}`,
		...pages.flatMap(({ boxes }, at) => [`page ${at + 1}`, ...boxes.map(boxLine)]),
		'tags',
		...structure.map(({ role, parent, ...details }, at) =>
			[at, role, `in ${parent ?? 'nothing'}`, JSON.stringify(details)].join(' ')
		),
		'bookmarks',
		...bookmarks.map(({ title, page, y }) => `${title}: page ${page + 1}, ${place(y)}`),
		'places',
		...[...anchors].map(([name, { page, y }]) => `${name}: page ${page + 1}, ${place(y)}`),
		''
	].join('\n');
}
