import type { TextStyle } from './typeset';

const regular = { face: 'sans', italic: 'sansItalic' } as const;
const bold = { face: 'sansBold', italic: 'sansBoldItalic' } as const;
// The slab has no italic: symbols never stand in it, so that its own face fills the place.
const slab = { face: 'slab', italic: 'slab' } as const;
const slabMedium = { face: 'slabMedium', italic: 'slabMedium' } as const;
const slabBold = { face: 'slabBold', italic: 'slabBold' } as const;

/** Every setting of the sheet: face, size and leading in pt. */
export const STYLES = {
	partNumber: { ...slabBold, size: 34, leading: 38, tracking: -0.012 * 34 },
	className: { ...slab, size: 15, leading: 19 },
	description: { ...regular, size: 10, leading: 13.5 },
	headline: { ...regular, size: 10.5, leading: 14.5 },
	figure: { ...slabMedium, size: 18, leading: 23 },
	figureWord: { ...slabMedium, size: 10.5, leading: 23 },
	figureLabel: { ...regular, size: 8, leading: 10.5 },
	sectionHead: { ...slabMedium, size: 11.5, leading: 14 },
	sectionNote: { ...regular, size: 8, leading: 10 },
	list: { ...regular, size: 8.8, leading: 11.6 },
	listBold: { ...bold, size: 8.8, leading: 11.6 },
	maker: { ...slabMedium, size: 9, leading: 12 },
	statusLabel: { ...regular, size: 7.6, leading: 10 },
	statusValue: { ...regular, size: 8, leading: 10 },
	statusWord: { ...bold, size: 8.4, leading: 10, tracking: 0.06 * 8.4 },
	aside: { ...regular, size: 7.6, leading: 10.6 },
	asideHead: { ...bold, size: 7.6, leading: 10.6 },
	body: { ...regular, size: 8.5, leading: 10.6 },
	bodyBold: { ...bold, size: 8.5, leading: 10.6 },
	tableHead: { ...bold, size: 7.5, leading: 9 },
	basis: { ...slabMedium, size: 8, leading: 10.6 },
	basisTypical: { ...regular, size: 7.6, leading: 10.6 },
	footnote: { ...regular, size: 7.6, leading: 9.8 },
	footnoteMark: { ...slabMedium, size: 7.6, leading: 9.8 },
	footnoteBold: { ...bold, size: 7.6, leading: 9.8 },
	caption: { ...regular, size: 8.2, leading: 10.6 },
	captionBold: { ...bold, size: 8.2, leading: 10.6 },
	code: { ...regular, size: 7.8, leading: 10.6 },
	notice: { ...regular, size: 7.8, leading: 10.1 },
	noticeHead: { ...slabMedium, size: 8.2, leading: 11 },
	running: { ...regular, size: 7.5, leading: 9 },
	runningPart: { ...slabBold, size: 9.5, leading: 12 },
	runningStatus: { ...bold, size: 7, leading: 9, tracking: 0.06 * 7 },
	stateBox: { ...bold, size: 6.6, leading: 8 },
	banner: { ...slabBold, size: 9, leading: 12, tracking: 0.1 * 9 },
	bannerText: { ...regular, size: 8, leading: 12 },
	marginWord: { ...slabBold, size: 15, leading: 18, tracking: 0.1 * 15 },
	marginNote: { ...bold, size: 8, leading: 10 },
	boxWord: { ...slabBold, size: 9, leading: 12, tracking: 0.05 * 9 },
	boxText: { ...regular, size: 8.5, leading: 11.8 }
} as const satisfies Record<string, TextStyle>;

/** Weights of rules in pt. */
export const RULES = {
	plate: 3,
	section: 0.75,
	table: 0.5,
	row: 0.25,
	foot: 0.25
} as const;
