import { draftMessages } from '$lib/core/messages/datasheet';
import { findLastTextEditor, textEdit } from '../db/findLastTextEditor';
import { draftText } from '../db/schema';
import { findMissingCharacters } from '../pdf/fonts/findMissingCharacters';
import type { Stores } from '../work/stores';
import { editDraft, refused, type DraftEditor, type Edit, type Refused } from './editDraft';
import { nameCharacter } from '$lib/core/datasheet/nameCharacter';

export interface TextToWrite extends DraftEditor {
	readonly block: string;
	readonly text: string;
	/** Of the text that was edited; 0 for a block nobody has written yet. */
	readonly rowVersion: number;
}

export type WriteOutcome =
	| { readonly status: 'written'; readonly rowVersion: number }
	| {
			readonly status: 'conflict';
			readonly message: string;
			/** What stands there now, by somebody else. */
			readonly theirs: string;
			readonly rowVersion: number;
			/** What this person wrote: handed back, nothing is lost. */
			readonly yours: string;
	  }
	| Refused;

/**
 * Writes one block of the draft's text. Each block has its own version: whoever was second sees both
 * texts. Characters that the printed faces lack are refused by name, before they print as a box.
 */
export async function writeText(
	{ db }: Pick<Stores, 'db'>,
	wanted: TextToWrite
): Promise<WriteOutcome> {
	const text = wanted.text.replaceAll('\r\n', '\n').normalize('NFC').trim();
	const missing = findMissingCharacters(text);
	if (missing.length > 0)
		return refused(draftMessages.charactersMissing(missing.map(nameCharacter)));

	let conflict: WriteOutcome | undefined;
	const outcome = await editDraft(db, wanted, async (tx, { draft }) => {
		conflict = undefined;
		const isBlock = draft.template.sections.some(
			(section) => section.kind === 'prose' && section.block === wanted.block
		);
		if (!isBlock) return refused(draftMessages.blockUnknown(wanted.block));
		const held = draft.texts.get(wanted.block);
		const stands = held ?? { text: '', rowVersion: 0 };
		if (stands.rowVersion !== wanted.rowVersion && stands.text !== text) {
			const other = await findLastTextEditor(tx, draft.id, wanted.block);
			const message = draftMessages.writtenMeanwhile(other?.name ?? null);
			const { text: theirs, rowVersion } = stands;
			conflict = { status: 'conflict', message, theirs, rowVersion, yours: wanted.text };
			return refused(message);
		}
		const rowVersion = stands.rowVersion + 1;
		await tx
			.insert(draftText)
			.values({ draft: draft.id, block: wanted.block, text, rowVersion })
			.onConflictDoUpdate({
				target: [draftText.draft, draftText.block],
				set: { text, rowVersion }
			});
		const edit: Edit<WriteOutcome> = {
			status: 'edited',
			action: 'draft.write',
			what: textEdit(wanted.block),
			details: { block: wanted.block, before: stands.text, after: text },
			result: { status: 'written', rowVersion }
		};
		return edit;
	});
	return conflict ?? outcome;
}
