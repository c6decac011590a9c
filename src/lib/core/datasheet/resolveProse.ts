import { draftMessages } from '../messages/datasheet';
import type { TemplateSection } from '../template/template';
import type { DocumentSection, RichText } from './document';
import { parseProse, type ProseToken, type Reference } from './parseProse';
import { isPrinted, type Place } from './place';
import { printNumber, withUnit } from './printNumber';
import type { DraftProblem } from './resolveInput';
import { symbolRuns } from './symbolRuns';

type ProseSection = Extract<TemplateSection, { kind: 'prose' }>;

const DEFAULT_TEMPERATURE = 25;
const PART_WORDS = { minimum: 'minimum', typical: 'typical value', maximum: 'maximum' } as const;

interface ResolvedProse {
	readonly section: Extract<DocumentSection, { kind: 'prose' }>;
	readonly problems: DraftProblem[];
}

/**
 * The text of one block with its inline bindings filled in. Lines part list items, empty lines part
 * paragraphs. What can't be filled stays as it was typed, and is a problem with its position.
 */
export function resolveProse(
	template: ProseSection,
	text: string,
	places: readonly Place[]
): ResolvedProse {
	const problems: DraftProblem[] = [];
	const paragraphs = passages(text, template.style).map(({ words, start }) =>
		parseProse(words).flatMap((token): RichText => {
			const filled = fill(token, places);
			if (typeof filled !== 'string') return filled;
			problems.push({
				place: template.block,
				label: template.heading ?? template.block,
				message: filled,
				position: start + token.position
			});
			return [{ kind: 'text', text: token.text }];
		})
	);
	const { block, heading, style } = template;
	return { section: { kind: 'prose', block, heading, style, paragraphs }, problems };
}

/** The runs of a token, or why it has none. */
function fill(token: ProseToken, places: readonly Place[]): RichText | string {
	switch (token.kind) {
		case 'text':
			return symbolRuns(token.text.replace(/\s+/g, ' '));
		case 'unread':
			return token.isOpen
				? draftMessages.placeholderOpen()
				: draftMessages.placeholderUnread(token.text);
		case 'reference': {
			const matching = places.filter((place) => isMeant(token.reference, place));
			if (matching.length === 0) return draftMessages.placeholderUnknown(token.text);
			const part = token.reference.part;
			for (const place of matching.filter(isPrinted)) {
				const printed = place.prints?.[part];
				if (place.prints && printed !== null && printed !== undefined)
					return [
						{
							kind: 'value',
							text: withUnit(printNumber(printed, 1).text, place.prints.unit),
							slot: place.id
						}
					];
			}
			return draftMessages.placeholderNoValue(token.text, PART_WORDS[part]);
		}
		default:
			return token satisfies never;
	}
}

function isMeant(reference: Reference, place: Place): boolean {
	if (reference.name !== place.name) return false;
	if (place.kind === 'rating')
		return reference.reverseVoltage === null && reference.temperatureCelsius === null;
	return (
		reference.reverseVoltage === place.reverseVoltage &&
		(reference.temperatureCelsius ?? DEFAULT_TEMPERATURE) === place.temperatureCelsius &&
		(reference.frequency === null || reference.frequency === place.frequency)
	);
}

/** The text's paragraphs or list items, trimmed, with where each starts in the whole. */
function passages(text: string, style: ProseSection['style']): { words: string; start: number }[] {
	const passage = style === 'list' ? /[^\n]+/g : /(?:[^\n]|\n(?!\s*\n))+/g;
	return [...text.matchAll(passage)].flatMap(({ 0: raw, index }) => {
		const words = raw.trim();
		return words === '' ? [] : [{ words, start: index + raw.indexOf(words) }];
	});
}
