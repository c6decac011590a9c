/** A stroke of a chart: colour, width and dashes in the unit of the chart (pt on paper, px else). */
export interface Stroke {
	readonly color: string;
	readonly width: number;
	readonly dash?: readonly number[];
}

/** Everything about a chart that depends on where it is shown: its size, inks, strokes and type. */
export interface ChartTheme {
	/** Outer size: axis names and tick labels lie inside it. */
	readonly width: number;
	readonly height: number;
	/** Space for the tick labels at the left. */
	readonly axisSpace: number;
	readonly font: string;
	readonly tickSize: number;
	readonly labelSize: number;
	readonly axisSize: number;
	readonly paper: string;
	readonly ink: string;
	readonly inkSoft: string;
	readonly frame: Stroke;
	readonly grid: Stroke;
	readonly decade: Stroke;
	readonly leader: Stroke;
	readonly typical: Stroke;
	/** Second and further curves of one chart. */
	readonly further: Stroke;
	readonly minimum: Stroke;
	readonly maximum: Stroke;
	readonly band: string;
	readonly sweep: Stroke;
	readonly outside: Stroke;
	/** Whether a reading follows the pointer; never on paper. */
	readonly isInteractive: boolean;
}

/** The dashes tell minimum from maximum without colour; lengths in pt at print size. */
const MINIMUM_DASH = [7, 2.4] as const;
const MAXIMUM_DASH = [2.2, 1.6] as const;

/** One millimetre in PDF points. */
const MILLIMETRE = 72 / 25.4;

/** Ink on paper, in pt: the full measure of 174 mm, 116 mm high. */
export const printTheme: ChartTheme = {
	width: 174 * MILLIMETRE,
	height: 116 * MILLIMETRE,
	axisSpace: 30,
	font: "'Source Sans 3'",
	tickSize: 7.4,
	labelSize: 7.8,
	axisSize: 8,
	paper: '#ffffff',
	ink: '#000000',
	inkSoft: '#000000',
	frame: { color: '#000000', width: 0.5 },
	grid: { color: '#9a9a9a', width: 0.18 },
	decade: { color: '#777777', width: 0.3 },
	leader: { color: '#000000', width: 0.35 },
	typical: { color: '#000000', width: 1.15 },
	further: { color: '#000000', width: 0.7 },
	minimum: { color: '#000000', width: 0.6, dash: MINIMUM_DASH },
	maximum: { color: '#000000', width: 0.6, dash: MAXIMUM_DASH },
	band: '#d5e5e1',
	sweep: { color: '#9a9a9a', width: 0.25 },
	outside: { color: '#000000', width: 0.5 },
	isInteractive: false
};

/** A chart over half the measure, so that two stand side by side. */
export const halfPrintTheme: ChartTheme = {
	...printTheme,
	width: 84 * MILLIMETRE,
	height: 80 * MILLIMETRE
};

/** The design tokens a chart uses, as values: a canvas can't read CSS variables. */
const SCREEN_INKS = {
	light: {
		paper: '#fffdf8',
		ink: '#1a2230',
		inkSoft: '#566070',
		rule: '#ddd5c3',
		ruleStrong: '#857c68',
		cobalt: '#2b4c8c',
		vermilion: '#b5371b',
		band: '#dfe4ee',
		sweep: '#1a223038'
	},
	dark: {
		paper: '#1a1e25',
		ink: '#ece6d9',
		inkSoft: '#a9aeb6',
		rule: '#333944',
		ruleStrong: '#7d8693',
		cobalt: '#9db7ee',
		vermilion: '#f2907a',
		band: '#262f42',
		sweep: '#ece6d92e'
	}
} as const;

/** Screen inks in px; the page says how large the chart may be. */
export function screenTheme(
	scheme: 'light' | 'dark',
	size: { readonly width: number; readonly height: number }
): ChartTheme {
	const inks = SCREEN_INKS[scheme];
	return {
		...size,
		axisSpace: 44,
		font: "'Source Sans 3', system-ui, sans-serif",
		tickSize: 12,
		labelSize: 12,
		axisSize: 12,
		paper: inks.paper,
		ink: inks.ink,
		inkSoft: inks.inkSoft,
		frame: { color: inks.ruleStrong, width: 1 },
		grid: { color: inks.rule, width: 0.5 },
		decade: { color: inks.rule, width: 1.25 },
		leader: { color: inks.inkSoft, width: 0.75 },
		typical: { color: inks.cobalt, width: 2.25 },
		further: { color: inks.cobalt, width: 1.25 },
		minimum: { color: inks.ink, width: 1.25, dash: [9, 3] },
		maximum: { color: inks.ink, width: 1.25, dash: [2.5, 2] },
		band: inks.band,
		sweep: { color: inks.sweep, width: 1 },
		outside: { color: inks.vermilion, width: 1.25 },
		isInteractive: true
	};
}
