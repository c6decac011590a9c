/**
 * The shape and the tone of each state. Squares speak of what fills a place (bound, stale …), the
 * tick, flag and empty box of rows that somebody checks, discs of what a datasheet is.
 */
export const STATES = {
	bound: { shape: 'square', tone: 'soft' },
	stale: { shape: 'half-square', tone: 'ochre' },
	unbound: { shape: 'hollow-square', tone: 'vermilion' },
	overridden: { shape: 'slashed-square', tone: 'ochre' },
	unsupported: { shape: 'hollow-square', tone: 'vermilion' },
	'struck out': { shape: 'struck-square', tone: 'soft' },
	ticked: { shape: 'tick', tone: 'verdigris' },
	flagged: { shape: 'flag', tone: 'vermilion' },
	open: { shape: 'box', tone: 'soft' },
	production: { shape: 'disc', tone: 'ink' },
	preliminary: { shape: 'half-disc', tone: 'ink' },
	target: { shape: 'ring', tone: 'ink' },
	draft: { shape: 'dashed-ring', tone: 'soft' },
	current: { shape: 'disc', tone: 'verdigris' },
	scheduled: { shape: 'half-disc', tone: 'cobalt' },
	superseded: { shape: 'ring', tone: 'soft' },
	withdrawn: { shape: 'struck-disc', tone: 'vermilion' },
	'in review': { shape: 'half-disc', tone: 'cobalt' },
	approved: { shape: 'tick', tone: 'verdigris' },
	published: { shape: 'disc', tone: 'verdigris' },
	returned: { shape: 'flag', tone: 'vermilion' },
	waiting: { shape: 'half-disc', tone: 'ochre' },
	running: { shape: 'half-disc', tone: 'cobalt' },
	done: { shape: 'tick', tone: 'verdigris' },
	failed: { shape: 'struck-disc', tone: 'vermilion' },
	refused: { shape: 'struck-disc', tone: 'vermilion' },
	kept: { shape: 'tick', tone: 'verdigris' },
	excluded: { shape: 'struck-square', tone: 'soft' }
} as const;

export type StateName = keyof typeof STATES;
export type Shape = (typeof STATES)[StateName]['shape'];
