import { BASIS_WORDS } from '../limits/basis';
import type { Change } from './change';
import type { DatasheetDocument } from './document';

type BasisNotes = DatasheetDocument['basisNotes'];

/** The percentages of a sentence in their order: content and confidence stand so in a basis note. */
function percentages(text: string): number[] {
	return [...text.matchAll(/(\d+(?:\.\d+)?)\s*%/g)].map(([, digits]) => Number(digits));
}

/**
 * Differences in what a basis mark means. Lower percentages (content, confidence) are weaker terms
 * for every row with that mark; a sentence with the same percentages is only reworded. Percentages
 * that went both ways, or changed in number, count as loosened: one of the promises got weaker.
 */
export function compareTerms(before: BasisNotes, after: BasisNotes): Change[] {
	return after.flatMap((note): Change[] => {
		const was = before.find(({ basis }) => basis === note.basis);
		if (was === undefined || was.text === note.text) return [];
		const common = {
			row: `basis.${note.basis}`,
			label: `Meaning of ${note.mark}, ${BASIS_WORDS[note.basis]}`,
			part: 'terms',
			before: was.text,
			after: note.text,
			relative: null
		};
		const [old, now] = [percentages(was.text), percentages(note.text)];
		if (old.length === now.length && old.every((value, place) => value === now[place]))
			return [{ ...common, kind: 'text', area: 'text' }];
		const isStronger =
			old.length === now.length && old.every((value, place) => value <= (now[place] ?? 0));
		return [{ ...common, kind: isStronger ? 'tightened' : 'loosened', area: 'basis' }];
	});
}
