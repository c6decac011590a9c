import { z } from 'zod';
import { basis } from '../limits/basis';

/** A decision of a person that a printed number rests on. */
const decided = {
	reason: z.string().min(1),
	/** Name of the person, as it was then. */
	by: z.string().min(1),
	at: z.iso.datetime()
};

/** What a place printed when it was bound: newer data that print something else make it stale. */
export const boundTexts = z.object({
	/** `inputHash` of the limit row. */
	inputHash: z.string(),
	unit: z.string(),
	unitScale: z.number().positive(),
	minimum: z.string().nullable(),
	typical: z.string().nullable(),
	maximum: z.string().nullable(),
	sampleSize: z.number().int(),
	independentLots: z.number().int()
});
export type BoundTexts = z.infer<typeof boundTexts>;

/** The printed texts hold although newer data say something else: an override. */
export const kept = z.object({
	...decided,
	/** What the newer data said then; when they move again the question is asked again. */
	against: boundTexts.nullable()
});
export type Kept = z.infer<typeof kept>;

/** A place filled by a computed limit. */
const bound = {
	policyVersion: z.number().int(),
	basis,
	/** Which test or correlation stands behind a basis the computation itself doesn't give. */
	basisReason: z.string().nullable(),
	printed: boundTexts,
	kept: kept.nullable(),
	at: z.iso.datetime()
};

export const limitBinding = z.object({ kind: z.literal('limit'), ...bound });
export type LimitBinding = z.infer<typeof limitBinding>;

export const struckOut = z.object({ kind: z.literal('struck-out'), ...decided });
export type StruckOut = z.infer<typeof struckOut>;

/** One bias of a table; a bias without a row is unbound. */
export const tableRowBinding = z.object({
	/** Reverse bias in V, one of the template's. */
	bias: z.number(),
	binding: z.discriminatedUnion('kind', [limitBinding, struckOut])
});
export type TableRowBinding = z.infer<typeof tableRowBinding>;

export const tableBinding = z.object({
	kind: z.literal('table'),
	rows: z.array(tableRowBinding)
});
export type TableBinding = z.infer<typeof tableBinding>;

/** A number as somebody types it: digits with a decimal point, an ASCII or typographic minus. */
export const numberText = z
	.string()
	.trim()
	.regex(/^[-−]?\d{1,9}(\.\d{1,6})?$/, 'expected a number like 30 or -55')
	.transform((text) => text.replace('-', '−'));

/** A limiting value: typed by a person, with the reason. */
export const ratingBinding = z.object({
	kind: z.literal('rating'),
	minimum: numberText.nullable(),
	maximum: numberText.nullable(),
	...decided
});
export type RatingBinding = z.infer<typeof ratingBinding>;

/** What fills a slot of a draft. The draft stores this, never a number of its own. */
export const binding = z.discriminatedUnion('kind', [
	limitBinding,
	tableBinding,
	ratingBinding,
	struckOut
]);
export type Binding = z.infer<typeof binding>;
