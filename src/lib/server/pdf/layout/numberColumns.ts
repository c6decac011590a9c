import { mm } from './paper';
import { STYLES } from './styles';
import { axisFor, type Column } from './table';
import { textSpan } from './typeset';

const head = (text: string) => (text === '' ? [] : [textSpan(text, STYLES.tableHead)]);

export interface NumberColumnHeads {
	readonly name: string;
	readonly typical: string;
	readonly basis: string;
}

export interface NumberTexts {
	readonly minimum: readonly (string | null)[];
	readonly typical: readonly (string | null)[];
	readonly maximum: readonly (string | null)[];
}

/**
 * The one set of columns of ratings and characteristics, so that they line up down the page:
 * symbol 16, name 57, conditions 44, minimum 12.7, typical 12.7, maximum 12.6, unit 11, basis 8 mm.
 */
export function numberColumns(heads: NumberColumnHeads, texts: NumberTexts): Column[] {
	return [
		{ x: 0, width: mm(15), set: 'text', head: head('Symbol') },
		{ x: mm(16), width: mm(56), set: 'text', head: head(heads.name) },
		{ x: mm(73), width: mm(43), set: 'text', head: head('Conditions') },
		{
			x: mm(117),
			width: mm(12.7),
			set: 'decimal',
			head: head('Min'),
			axis: axisFor(texts.minimum)
		},
		{
			x: mm(129.7),
			width: mm(12.7),
			set: 'decimal',
			head: head(heads.typical),
			axis: axisFor(texts.typical)
		},
		{
			x: mm(142.4),
			width: mm(12.6),
			set: 'decimal',
			head: head('Max'),
			axis: axisFor(texts.maximum)
		},
		{ x: mm(155), width: mm(11), set: 'text', head: head('Unit'), indent: mm(1.4) },
		{ x: mm(166), width: mm(8), set: 'centre', head: head(heads.basis) }
	];
}

/** Where the boxed state of a slot stands in such a row: over the typical column's place. */
export const STATE_X = mm(132);
/** The same beside a value: at the end of the conditions. */
export const STATE_END = mm(116);
