import { BASES } from '../limits/basis';
import type { Change } from './change';
import type { PrintedNumber } from './document';
import type { DocumentRow } from './documentRows';
import { plainText } from './plainText';

type Direction = 'tightened' | 'loosened';

/** What is the same in every change of one row. */
interface RowName {
	readonly row: string;
	readonly label: string;
}

/** (after − before) / |before|, or `null` where that says nothing. */
export function relativeChange(before: number, after: number): number | null {
	return before === 0 ? null : (after - before) / Math.abs(before);
}

/** The differences between two versions of one row of characteristics or of the C–V table. */
export function compareRows(before: DocumentRow, after: DocumentRow): Change[] {
	const name = { row: after.row.id, label: after.label };
	if (before.kind === 'rating' || after.kind === 'rating')
		return before.kind === after.kind ? compareRatings(before, after) : [];
	return [
		...compareConditions(before, after, name),
		...compareLimit('minimum', before.row.minimum, after.row.minimum, name),
		...compareTypical(before.row.typical, after.row.typical, name),
		...compareLimit('maximum', before.row.maximum, after.row.maximum, name),
		...compareBasis(before, after, name)
	];
}

function compareConditions(before: DocumentRow, after: DocumentRow, name: RowName): Change[] {
	const [was, is] = [conditionsOf(before), conditionsOf(after)];
	if (was === is) return [];
	return [
		{
			...name,
			kind: 'loosened',
			area: 'condition',
			part: 'conditions',
			before: was,
			after: is,
			relative: null
		}
	];
}

function conditionsOf(entry: DocumentRow): string {
	switch (entry.kind) {
		case 'rating':
			return plainText(entry.row.conditions);
		case 'characteristic':
			return `${plainText(entry.row.conditions)}; ${entry.row.temperatureCelsius} °C`;
		case 'capacitance':
			return `V_R = ${entry.row.bias.text} V; ${plainText(entry.section.conditions)}; ${entry.section.temperatureCelsius} °C; ${entry.section.frequency} Hz`;
		default:
			return entry satisfies never;
	}
}

function compareLimit(
	part: 'minimum' | 'maximum',
	before: PrintedNumber | null,
	after: PrintedNumber | null,
	name: RowName
): Change[] {
	const common = {
		...name,
		area: 'guarantee' as const,
		part,
		before: before?.text ?? null,
		after: after?.text ?? null
	};
	if (before === null && after === null) return [];
	if (before === null || after === null)
		return [{ ...common, kind: before === null ? 'added' : 'removed', relative: null }];
	if (before.value === after.value) return [];
	return [
		{
			...common,
			kind: limitDirection(part, before.value, after.value),
			relative: relativeChange(before.value, after.value)
		}
	];
}

/** A lower minimum and a higher maximum promise less. */
export function limitDirection(
	part: 'minimum' | 'maximum',
	before: number,
	after: number
): Direction {
	return (part === 'minimum') === after < before ? 'loosened' : 'tightened';
}

function compareTypical(
	before: PrintedNumber | null,
	after: PrintedNumber | null,
	name: RowName
): Change[] {
	if (before?.value === after?.value) return [];
	return [
		{
			...name,
			kind: before === null ? 'added' : after === null ? 'removed' : 'moved',
			area: 'typical',
			part: 'typical',
			before: before?.text ?? null,
			after: after?.text ?? null,
			relative: before && after ? relativeChange(before.value, after.value) : null
		}
	];
}

function compareBasis(
	before: Exclude<DocumentRow, { kind: 'rating' }>,
	after: Exclude<DocumentRow, { kind: 'rating' }>,
	name: RowName
): Change[] {
	const [was, is] = [before.row.basis, after.row.basis];
	if (was === is) return [];
	const strength = (of: typeof was) => (of === null ? BASES.length : BASES.indexOf(of));
	return [
		{
			...name,
			kind: strength(is) > strength(was) ? 'loosened' : 'tightened',
			area: 'basis',
			part: 'basis',
			before: was,
			after: is,
			relative: null
		}
	];
}

type RatingEntry = Extract<DocumentRow, { kind: 'rating' }>;

/** A rating isn't tightened or loosened: either way a customer has to look at the design again. */
function compareRatings(before: DocumentRow, after: DocumentRow): Change[] {
	if (before.kind !== 'rating' || after.kind !== 'rating') return [];
	const common = { row: after.row.id, label: after.label, kind: 'rating', area: 'rating' } as const;
	const parts = (['minimum', 'maximum'] as const).flatMap((part): Change[] => {
		const [was, is] = [before.row[part], after.row[part]];
		if (was?.value === is?.value) return [];
		return [
			{
				...common,
				part,
				before: was?.text ?? null,
				after: is?.text ?? null,
				relative: was && is ? relativeChange(was.value, is.value) : null
			}
		];
	});
	const [was, is] = [ratingTerms(before), ratingTerms(after)];
	if (was === is) return parts;
	return [...parts, { ...common, part: 'conditions', before: was, after: is, relative: null }];
}

/** What a rating says beside its number; the state tells a struck-out one from an empty one. */
function ratingTerms(entry: RatingEntry): string {
	const struck = entry.row.state === 'struck out' ? ' (struck out)' : '';
	return `${plainText(entry.row.conditions)}${struck}`;
}
