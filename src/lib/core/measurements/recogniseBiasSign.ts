import { readNumber } from '../units/readNumber';
import type { DecimalMark } from '../units/readNumber';
import type { RecognisedColumn } from './columns';
import type { BiasSign } from './mapping';

/** This share of the steps must agree, or a person is asked. */
const AGREEING = 0.8;

/**
 * Which sign a reverse bias has in a file. Capacitance falls as reverse bias grows, so it falls
 * along a growing voltage when reverse is positive. Looked at from line to line within a sweep:
 * where only bias and capacitance change. `undefined` when the data doesn't say.
 */
export function recogniseBiasSign(
	lines: readonly { readonly fields: readonly string[] }[],
	columns: readonly RecognisedColumn[],
	mark: DecimalMark
): BiasSign | undefined {
	const bias = columns.findIndex(({ meaning }) => meaning === 'bias');
	const capacitance = columns.findIndex(({ meaning }) => meaning === 'capacitance');
	if (bias < 0 || capacitance < 0) return undefined;
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
