import { z } from 'zod';
import { condition } from '../characteristics/condition';
import { letterSymbol } from '../characteristics/symbol';

export const PRODUCT_CLASSES = [
	'rectifier',
	'detector-mixer',
	'tuning',
	'switching',
	'pin'
] as const;
export const productClass = z.enum(PRODUCT_CLASSES);
export type ProductClass = z.infer<typeof productClass>;

export const CLASS_NAMES = {
	rectifier: 'Schottky rectifier',
	'detector-mixer': 'Detector and mixer diode',
	tuning: 'Tuning diode',
	switching: 'Switching diode',
	pin: 'PIN diode'
} as const satisfies Record<ProductClass, string>;

/** A key within a template, stable over its versions: drafts store bindings under it. */
const key = z
	.string()
	.regex(/^[a-z][a-z0-9-]*(\.[a-z0-9-]+)*$/, 'expected a key like ratings.reverse-voltage');

const heading = z.string().min(1).max(80);

/** A limiting value somebody types: symbol, name and unit stand here, the number in the draft. */
export const ratingSlot = z.object({
	slot: key,
	symbol: letterSymbol,
	name: z.string(),
	conditions: z.string().default(''),
	unit: z.string(),
	/** Which ends the rating has; a storage temperature has both. */
	ends: z.enum(['minimum', 'maximum', 'both']),
	/** What it is printed in steps of; finer digits are rounded so that it claims less. */
	step: z.number().positive().optional(),
	essential: z.boolean()
});
export type RatingSlot = z.infer<typeof ratingSlot>;

/** A characteristic at one condition, filled by a computed limit. */
export const limitSlot = z.object({
	slot: key,
	/** Key of the characteristic, as distributions are stored under it: `C_tot`. */
	characteristic: z.string(),
	symbol: letterSymbol,
	name: z.string(),
	unit: z.string(),
	/** Conditions that no reading is keyed by, with symbols as plain text: `mounted on FR4`. */
	conditions: z.string().default(''),
	/** What a reading is keyed by, in SI; the temperature in °C. */
	...condition.shape,
	/** Which of the three must be printed for the slot to count as bound. */
	required: z.array(z.enum(['minimum', 'typical', 'maximum'])),
	essential: z.boolean()
});
export type LimitSlot = z.infer<typeof limitSlot>;

/** What stands between the terminals in the graphic symbol. */
export const TERMINAL_GRAPHICS = ['diode', 'schottky', 'tuning'] as const;
export const terminalGraphic = z.enum(TERMINAL_GRAPHICS);
export type TerminalGraphic = z.infer<typeof terminalGraphic>;

/** Which is which: the number on the drawing, and what it is. */
export const terminal = z.object({ number: z.string().min(1).max(3), name: z.string().min(1) });

/** The set-ups that can be drawn; each measures one kind of characteristic. */
export const TEST_CIRCUITS = [
	'capacitance',
	'pulsed-forward',
	'reverse-recovery',
	'series-resistance'
] as const;
export const testCircuit = z.enum(TEST_CIRCUITS);
export type TestCircuit = z.infer<typeof testCircuit>;

export const chartAxis = z.object({
	symbol: letterSymbol,
	unit: z.string(),
	scale: z.enum(['linear', 'log'])
});
export type ChartAxis = z.infer<typeof chartAxis>;

/** What a chart shows: what follows from a printed table, or curves that are stored under a key. */
export const chartSource = z.discriminatedUnion('from', [
	z.object({
		from: z.literal('table'),
		table: key,
		/** 1/C² of the printed values; charge and energy of the power law fitted to them. */
		show: z.enum(['inverse-square', 'charge', 'energy'])
	}),
	z.object({ from: z.literal('curves'), curves: key, x: chartAxis, y: chartAxis })
]);
export type ChartSource = z.infer<typeof chartSource>;

/** One module a kind; datasheet.md lists what each prints. */
export const templateSection = z.discriminatedUnion('kind', [
	z.object({ kind: z.literal('masthead') }),
	z.object({
		kind: z.literal('prose'),
		block: key,
		heading: heading.nullable(),
		style: z.enum(['paragraph', 'list']),
		hint: z.string()
	}),
	z.object({ kind: z.literal('headline-figures'), slots: z.array(key).max(4) }),
	z.object({
		kind: z.literal('terminals'),
		heading,
		graphic: terminalGraphic,
		terminals: z.array(terminal).min(2).max(6),
		/** Whether the body has a band at the end of terminal 1. */
		hasBand: z.boolean()
	}),
	z.object({ kind: z.literal('ordering'), heading }),
	z.object({
		kind: z.literal('ratings'),
		heading,
		/** At the right of the head; the words about IEC 60134 when it is left out. */
		note: z.string().optional(),
		slots: z.array(ratingSlot)
	}),
	z.object({ kind: z.literal('thermal'), heading, slots: z.array(limitSlot) }),
	z.object({ kind: z.literal('characteristics'), heading, slots: z.array(limitSlot) }),
	z.object({
		kind: z.literal('capacitance-table'),
		heading,
		slot: key,
		temperatureCelsius: z.number(),
		frequency: z.number().positive(),
		/** Biases in V; those outside the measured range stay unbound. */
		biases: z.array(z.number().nonnegative()).min(1),
		/** Bias the ratio column divides by; `null` leaves the column out. */
		ratioTo: z.number().nullable(),
		essential: z.boolean()
	}),
	z.object({ kind: z.literal('capacitance-chart'), heading, table: key }),
	z.object({
		kind: z.literal('chart'),
		heading,
		/** With symbols as plain text; the conditions belong here too. */
		caption: z.string(),
		source: chartSource,
		width: z.enum(['half', 'full'])
	}),
	z.object({ kind: z.literal('outline'), heading, hasLand: z.boolean() }),
	z.object({
		kind: z.literal('test-circuit'),
		heading,
		circuit: testCircuit,
		/** Key of the characteristic it measures: drawn where the sheet prints one. */
		measures: z.string(),
		caption: z.string()
	}),
	/** Parameters of a simulator's model, fitted to the typical values of a table. */
	z.object({ kind: z.literal('model'), heading, table: key }),
	z.object({ kind: z.literal('revision-history'), heading }),
	z.object({ kind: z.literal('notice'), heading })
]);
export type TemplateSection = z.infer<typeof templateSection>;

/**
 * The formats a template can be written in. The second one has more kinds of section; what was
 * written in the first is read as it was.
 */
export const TEMPLATE_FORMATS = ['platen-template-1', 'platen-template-2'] as const;

/** The kinds that came with the second format. */
export const SECOND_FORMAT_KINDS: ReadonlySet<TemplateSection['kind']> = new Set([
	'terminals',
	'thermal',
	'chart',
	'outline',
	'test-circuit',
	'model'
]);

/**
 * The shape of a datasheet template: data, not code; one JSON file a product class. What a shape
 * can't say is checked by `parseTemplate` as well.
 */
export const template = z.object({
	format: z.enum(TEMPLATE_FORMATS),
	key,
	name: z.string().min(1),
	productClass,
	/** Which standard asks for the essential slots, and what of that is from memory. */
	sources: z.string(),
	sections: z.array(templateSection).min(1)
});
export type Template = z.infer<typeof template>;
