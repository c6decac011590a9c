import { readFileSync } from 'node:fs';
import { z } from 'zod';

const row = z.object({
	id: z.string(),
	area: z.string(),
	quantity: z.string(),
	inputs: z.record(z.string(), z.unknown()),
	expected: z.unknown(),
	tolerance: z.record(z.string(), z.unknown()),
	source: z.string()
});

/** One reference value: what it is of, from what, how near one must come, and who says so. */
export type Row = z.infer<typeof row>;

export const ROWS: readonly Row[] = z
	.array(row)
	.parse(JSON.parse(readFileSync(new URL('references.json', import.meta.url), 'utf8')));

/** The expected value of another row, for quantities that belong together. */
export function expectedOf(id: string): number {
	const found = ROWS.find((candidate) => candidate.id === id);
	return z.number().parse(found?.expected);
}

export const numberAt = (inputs: Row['inputs'], key: string): number =>
	z.number().parse(inputs[key]);

export const textAt = (inputs: Row['inputs'], key: string): string => z.string().parse(inputs[key]);

export const numbersAt = (inputs: Row['inputs'], key: string): number[] =>
	z.array(z.number()).parse(inputs[key]);

export const groupsAt = (inputs: Row['inputs'], key: string): number[][] =>
	z.array(z.array(z.number())).parse(inputs[key]);

export const objectAt = (inputs: Row['inputs'], key: string): Record<string, unknown> =>
	z.record(z.string(), z.unknown()).parse(inputs[key]);

/** Content and confidence of a row. */
export const promiseOf = (inputs: Row['inputs']) => ({
	content: numberAt(inputs, 'content'),
	confidence: numberAt(inputs, 'confidence')
});
