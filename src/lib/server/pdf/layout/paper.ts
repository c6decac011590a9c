/** One millimetre in points. */
export const MM = 72 / 25.4;
export const mm = (millimetres: number) => millimetres * MM;

/** The measure of every page: 12 columns of 9 mm with gutters of 6. */
export const MEASURE = mm(174);
export const THIRD = mm(54);
export const QUARTER = mm(39);
export const GUTTER = mm(6);

export interface Paper {
	readonly name: 'a4' | 'letter';
	readonly width: number;
	readonly height: number;
	/** Left edge of the measure; change bars stand left of it. */
	readonly left: number;
	/** Upper and lower limit of the body. */
	readonly top: number;
	readonly bottom: number;
	/** Upper edge of the masthead on the first page. */
	readonly mastheadTop: number;
	readonly headRule: number;
	readonly headBaseline: number;
	readonly footRule: number;
	readonly footBaseline: number;
}

function paper(name: Paper['name'], width: number, height: number, left: number): Paper {
	return {
		name,
		width,
		height,
		left,
		top: mm(22.5),
		bottom: height - mm(19),
		mastheadTop: mm(14),
		headRule: mm(17.5),
		headBaseline: mm(14),
		footRule: height - mm(15.4),
		footBaseline: height - mm(12.3)
	};
}

/** Both papers carry the same measure; Letter is wider and less high. */
export const PAPERS = {
	a4: paper('a4', mm(210), mm(297), mm(20)),
	letter: paper('letter', 612, 792, mm(23))
} as const;
