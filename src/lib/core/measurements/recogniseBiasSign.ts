import { readNumber } from '../units/readNumber';
import type { DecimalMark } from '../units/readNumber';
import { contentOf } from './columns';
import type { RecognisedColumn } from './columns';
import type { BiasSign } from './mapping';

/** This share of the steps must agree, or a person is asked. */
const AGREEING = 0.8;

/** A junction carries so many times more current forward than in reverse, somewhere in its sweep. */
const RECTIFIES = 10;

type Lines = readonly { readonly fields: readonly string[] }[];

/** Which sign a reverse bias has in a file; `undefined` when the data doesn't say. */
export function recogniseBiasSign(
	lines: Lines,
	columns: readonly RecognisedColumn[],
	mark: DecimalMark
): BiasSign | undefined {
	const bias = columns.findIndex(({ meaning }) => meaning === 'bias');
	const content = contentOf(columns);
	if (bias < 0 || content === undefined) return undefined;
	const measured = columns.findIndex(({ meaning }) => meaning === content);
	switch (content) {
		case 'capacitance':
			return byFall(lines, columns, { bias, capacitance: measured, mark });
		case 'current':
			return byRectification(lines, { bias, current: measured, mark });
		case 'value':
			return bySign(lines, bias, mark);
		default:
			return content satisfies never;
	}
}

/** The larger current flows forward. */
function byRectification(
	lines: Lines,
	{
		bias,
		current,
		mark
	}: { readonly bias: number; readonly current: number; readonly mark: DecimalMark }
): BiasSign | undefined {
	let [positive, negative] = [0, 0];
	for (const { fields } of lines) {
		const voltage = readNumber(fields[bias] ?? '', mark) ?? 0;
		const size = Math.abs(readNumber(fields[current] ?? '', mark) ?? 0);
		if (voltage > 0) positive = Math.max(positive, size);
		if (voltage < 0) negative = Math.max(negative, size);
	}
	if (positive === 0 || negative === 0) return undefined;
	if (negative > RECTIFIES * positive) return 'reversePositive';
	return positive > RECTIFIES * negative ? 'reverseNegative' : undefined;
}

/** The bias of a reading is a reverse one, whatever its sign. */
function bySign(lines: Lines, bias: number, mark: DecimalMark): BiasSign | undefined {
	const biases = lines.flatMap(({ fields }) => readNumber(fields[bias] ?? '', mark) ?? []);
	if (biases.length === 0) return undefined;
	if (biases.every((voltage) => voltage >= 0)) return 'reversePositive';
	return biases.every((voltage) => voltage <= 0) ? 'reverseNegative' : undefined;
}

/**
 * Capacitance falls as reverse bias grows, so it falls along a growing voltage when reverse is
 * positive. Looked at from line to line within a sweep: where only bias and capacitance change.
 */
function byFall(
	lines: Lines,
	columns: readonly RecognisedColumn[],
	{
		bias,
		capacitance,
		mark
	}: { readonly bias: number; readonly capacitance: number; readonly mark: DecimalMark }
): BiasSign | undefined {
	const sweepOf = (fields: readonly string[]) =>
		fields
			.filter(
				(_, position) =>
					position !== bias &&
					(columns[position]?.meaning ?? 'ignore') !== 'ignore' &&
					position !== capacitance
			)
			.join('\u001f');

	let [falls, rises] = [0, 0];
	for (const [index, { fields }] of lines.entries()) {
		const before = lines[index - 1]?.fields;
		if (before === undefined || sweepOf(before) !== sweepOf(fields)) continue;
		const step = difference(before[bias], fields[bias], mark);
		const change = difference(before[capacitance], fields[capacitance], mark);
		if (step * change < 0) falls += 1;
		if (step * change > 0) rises += 1;
	}
	if (falls > AGREEING * (falls + rises)) return 'reversePositive';
	if (rises > AGREEING * (falls + rises)) return 'reverseNegative';
	return undefined;
}

/** From one field to the next; NaN when one is no number. */
function difference(from: string | undefined, to: string | undefined, mark: DecimalMark): number {
	return (readNumber(to ?? '', mark) ?? Number.NaN) - (readNumber(from ?? '', mark) ?? Number.NaN);
}
