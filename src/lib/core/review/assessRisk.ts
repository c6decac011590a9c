import type { Change } from '../datasheet/change';
import {
	concernLoosened,
	concernNoSecondRoute,
	concernNothingMeasured,
	concernOutside,
	concernOverridden,
	concernRatingChanged,
	concernRoutesDiffer,
	concernStruckOut,
	concernTypedDigits
} from '../messages/verification';
import type { AgainstPrevious } from './previousRow';
import type { SheetRow } from './sheetRows';
import type { ComputedEvidence, VerificationEvidence } from './verificationEvidence';

export type Assessment = Pick<VerificationEvidence, 'risk' | 'concerns'>;

/**
 * Low risk, and tickable as a group: both routes agree, no more devices outside than the basis
 * allows, nothing loosened against the release before. What nothing measured stands behind is low
 * only where the release before said the same. Everything else is ticked singly.
 */
export function assessRisk(
	row: SheetRow,
	computed: ComputedEvidence | null,
	against: AgainstPrevious
): Assessment {
	if (computed?.status === 'pending') return { risk: 'pending', concerns: [] };
	const concerns = [
		...(computed === null ? typedConcerns(row, against) : computedConcerns(computed)),
		...(row.entry?.row.state === 'overridden' ? [concernOverridden()] : []),
		...against.changes.flatMap(changeConcerns)
	];
	return { risk: concerns.length === 0 ? 'low' : 'high', concerns };
}

function typedConcerns(row: SheetRow, { isUnchanged }: AgainstPrevious): string[] {
	if (isUnchanged) return [];
	switch (row.statement.kind) {
		case 'rating':
			return [concernNothingMeasured()];
		case 'struck out':
			return [concernStruckOut()];
		case 'text':
			return [concernTypedDigits()];
		case 'capacitance':
		case 'characteristic':
			return [concernNoSecondRoute('no computed limit stands behind it')];
		default:
			return row.statement.kind satisfies never;
	}
}

const PARTS = ['minimum', 'typical', 'maximum'] as const;
const ENDS = ['minimum', 'maximum'] as const;

function computedConcerns(computed: Exclude<ComputedEvidence, { status: 'pending' }>): string[] {
	if (computed.status === 'refused') return [concernNoSecondRoute(computed.reason)];
	return [
		...PARTS.flatMap((part) => {
			const check = computed.checks[part];
			return check === null || check.agrees
				? []
				: [concernRoutesDiffer(part, check.deviationPercent)];
		}),
		...ENDS.flatMap((end) => {
			const outside = computed.outside[end];
			return outside === null || outside.count <= outside.allowed
				? []
				: [concernOutside(end, outside.count, outside.allowed)];
		})
	];
}

function changeConcerns(change: Change): string[] {
	if (change.kind === 'loosened') return [concernLoosened(change.part)];
	if (change.kind === 'removed') return [concernLoosened(change.part)];
	if (change.kind === 'rating') return [concernRatingChanged()];
	return [];
}
