import { z } from 'zod';
import { letterSymbol } from '../characteristics/symbol';
import { basis } from '../limits/basis';
import { dimension, landDimension, outlineShape } from '../outline/packageOutline';
import {
	chartAxis,
	productClass,
	terminal,
	terminalGraphic,
	testCircuit
} from '../template/template';

/** A run of text. Symbols are set by their own rule, bound digits are marked on a proof. */
export const textRun = z.discriminatedUnion('kind', [
	z.object({ kind: z.literal('text'), text: z.string() }),
	z.object({ kind: z.literal('symbol'), symbol: letterSymbol }),
	z.object({ kind: z.literal('value'), text: z.string(), slot: z.string() })
]);
export type TextRun = z.infer<typeof textRun>;
export const richText = z.array(textRun);
export type RichText = z.infer<typeof richText>;

export const datasheetStatus = z.enum(['target', 'preliminary', 'production']);
export type DatasheetStatus = z.infer<typeof datasheetStatus>;

/** A printed number: the digits as they stand on paper, and the same in SI for machines. */
export const printedNumber = z.object({ text: z.string(), value: z.number() });
export type PrintedNumber = z.infer<typeof printedNumber>;

export const slotState = z.enum([
	'bound',
	'unbound',
	'stale',
	'overridden',
	'unsupported',
	'struck out'
]);
export type SlotState = z.infer<typeof slotState>;

/** What every row has: a stable id, the state of its slot, and the way back to its devices. */
const row = {
	/** Stable over revisions: `capacitance-table.25C.VR=4`. */
	id: z.string(),
	slot: z.string(),
	state: slotState,
	/** `inputHash` of the limit behind it; `null` where nothing was computed. */
	trace: z.string().nullable()
};

const threeValues = {
	minimum: printedNumber.nullable(),
	typical: printedNumber.nullable(),
	maximum: printedNumber.nullable()
};

export const ratingRow = z.object({
	...row,
	symbol: letterSymbol,
	name: z.string(),
	conditions: richText,
	minimum: printedNumber.nullable(),
	maximum: printedNumber.nullable(),
	unit: z.string(),
	/** Who typed it and why: a rating rests on a person, not on a computation. */
	by: z.string().nullable(),
	reason: z.string().nullable()
});
export type RatingRow = z.infer<typeof ratingRow>;

export const characteristicRow = z.object({
	...row,
	symbol: letterSymbol,
	name: z.string(),
	conditions: richText,
	temperatureCelsius: z.number(),
	...threeValues,
	unit: z.string(),
	basis: basis.nullable()
});
export type CharacteristicRow = z.infer<typeof characteristicRow>;

export const capacitanceRow = z.object({
	...row,
	/** Reverse bias in V, as printed and as a number. */
	bias: printedNumber,
	...threeValues,
	/** Deviation of minimum and maximum from typical in %, signed. */
	deviationMinimum: printedNumber.nullable(),
	deviationMaximum: printedNumber.nullable(),
	/** Typical divided by the typical at the reference bias. */
	ratio: printedNumber.nullable(),
	basis: basis.nullable()
});
export type CapacitanceRow = z.infer<typeof capacitanceRow>;

/** A curve of a chart: points in the units of its axes, x rising. */
export const chartCurve = z.object({
	/** What tells it from the others: `typical, T_j = 25 °C`; symbols as plain text. */
	label: z.string(),
	points: z.array(z.tuple([z.number(), z.number()])).min(2),
	/** Whether devices were measured there; a computed curve is dashed and says so. */
	isMeasured: z.boolean()
});
export type ChartCurve = z.infer<typeof chartCurve>;

/** A guaranteed value beside typical curves. */
export const chartLimit = z.object({
	x: z.number(),
	y: z.number(),
	side: z.enum(['minimum', 'maximum']),
	label: z.string()
});
export type ChartLimit = z.infer<typeof chartLimit>;

export const documentSection = z.discriminatedUnion('kind', [
	z.object({ kind: z.literal('masthead') }),
	z.object({
		kind: z.literal('prose'),
		block: z.string(),
		heading: z.string().nullable(),
		style: z.enum(['paragraph', 'list']),
		/** One entry a paragraph or list item. */
		paragraphs: z.array(richText)
	}),
	z.object({
		kind: z.literal('headline-figures'),
		figures: z.array(
			z.object({
				/** `25.0`, or `23.5 to 26.6` where both ends are printed. */
				figure: z.string(),
				/** What follows in smaller type: `pF`, `pF typ`, `V max`. */
				unit: z.string(),
				label: richText,
				basis: basis.nullable(),
				slot: z.string()
			})
		)
	}),
	z.object({
		kind: z.literal('terminals'),
		heading: z.string(),
		graphic: terminalGraphic,
		terminals: z.array(terminal),
		hasBand: z.boolean(),
		/** Code on the body; `null` when the ordering codes differ in it. */
		marking: z.string().nullable()
	}),
	z.object({
		kind: z.literal('ordering'),
		heading: z.string(),
		rows: z.array(
			z.object({
				code: z.string(),
				package: z.string(),
				grade: z.string(),
				marking: z.string(),
				packing: z.string(),
				quantity: z.number().int()
			})
		)
	}),
	z.object({
		kind: z.literal('ratings'),
		heading: z.string(),
		note: z.string(),
		rows: z.array(ratingRow)
	}),
	z.object({
		kind: z.literal('thermal'),
		heading: z.string(),
		rows: z.array(characteristicRow)
	}),
	z.object({
		kind: z.literal('characteristics'),
		heading: z.string(),
		note: z.string(),
		rows: z.array(characteristicRow)
	}),
	z.object({
		kind: z.literal('capacitance-table'),
		heading: z.string(),
		slot: z.string(),
		/** The general condition, at the right of the head. */
		conditions: richText,
		temperatureCelsius: z.number(),
		frequency: z.number(),
		unit: z.string(),
		unitScale: z.number(),
		/** Reference bias of the ratio column in V; `null` leaves the column out. */
		ratioTo: z.number().nullable(),
		rows: z.array(capacitanceRow)
	}),
	z.object({
		kind: z.literal('capacitance-chart'),
		heading: z.string(),
		conditions: richText,
		caption: richText,
		unit: z.string(),
		/** Marked points: the printed table. Biases in V, capacitances in `unit`. */
		points: z.array(
			z.object({
				bias: z.number(),
				minimum: z.number().nullable(),
				typical: z.number(),
				maximum: z.number().nullable(),
				basis: basis.nullable()
			})
		)
	}),
	z.object({
		kind: z.literal('chart'),
		heading: z.string(),
		caption: richText,
		width: z.enum(['half', 'full']),
		x: chartAxis,
		y: chartAxis,
		curves: z.array(chartCurve),
		limits: z.array(chartLimit)
	}),
	z.object({
		kind: z.literal('outline'),
		heading: z.string(),
		package: z.string(),
		shape: outlineShape,
		dimensions: z.array(dimension),
		/** Empty where no land pattern is suggested. */
		land: z.array(landDimension)
	}),
	z.object({
		kind: z.literal('test-circuit'),
		heading: z.string(),
		circuit: testCircuit,
		caption: richText
	}),
	z.object({
		kind: z.literal('model'),
		heading: z.string(),
		/** Of what device at what temperature. */
		conditions: richText,
		parameters: z.array(
			z.object({
				/** Letters as the simulator has them: `CJO`. */
				name: z.string(),
				meaning: z.string(),
				value: printedNumber,
				unit: z.string()
			})
		),
		/** The text of the model file. */
		text: z.string(),
		/** How well it gives the printed values back. */
		note: z.string()
	}),
	z.object({ kind: z.literal('revision-history'), heading: z.string() }),
	z.object({ kind: z.literal('notice'), heading: z.string(), paragraphs: z.array(z.string()) })
]);
export type DocumentSection = z.infer<typeof documentSection>;

/** The second format has more kinds of section; documents frozen in the first are read as they were. */
export const DOCUMENT_FORMATS = ['platen-datasheet-1', 'platen-datasheet-2'] as const;

/**
 * A resolved datasheet: everything it says, nothing of when or as which version it is published.
 * The same value feeds the screen, the PDF, the JSON, the difference and the hash.
 */
export const datasheetDocument = z.object({
	format: z.enum(DOCUMENT_FORMATS),
	partNumber: z.string(),
	productClass,
	className: z.string(),
	package: z.string(),
	description: z.string(),
	status: datasheetStatus,
	organization: z.object({
		name: z.string(),
		paper: z.enum(['a4', 'letter']),
		language: z.string()
	}),
	template: z.object({ key: z.string(), number: z.number().int() }),
	sections: z.array(documentSection),
	/** The terms behind each basis mark that occurs, in the order of strength. */
	basisNotes: z.array(z.object({ basis, mark: z.string(), text: z.string() })),
	/** Statements below the tables: typical values, rounding, what statistical limits rest on. */
	footnotes: z.array(z.string())
});
export type DatasheetDocument = z.infer<typeof datasheetDocument>;
