import { findCharacteristic } from '$lib/core/characteristics/catalogue';
import type { DocumentRow } from '$lib/core/datasheet/documentRows';
import { derivedHasOneRoute, memoMissing, memoUnreadable } from '$lib/core/messages/verification';
import { computeEvidence } from '$lib/core/review/secondRoute/computeEvidence';
import type { SheetRow } from '$lib/core/review/sheetRows';
import type { ComputedEvidence } from '$lib/core/review/verificationEvidence';
import type { EvidenceSource } from './evidenceSource';

type LimitEntry = Exclude<DocumentRow, { kind: 'rating' }>;

/** Whether a stored limit stands behind the row, so that there is something to recompute. */
export function hasLimitBehind(row: SheetRow): boolean {
	return row.entry !== null && row.entry.kind !== 'rating' && row.entry.row.trace !== null;
}

/** Recomputes one row by the second route; `null` for what nothing was computed for. */
export async function gatherEvidence(
	source: EvidenceSource,
	{ entry }: SheetRow
): Promise<ComputedEvidence | null> {
	if (entry === null || entry.kind === 'rating' || entry.row.trace === null) return null;
	const stored = await source.storedLimit(entry.row.trace);
	if (stored === 'missing') return { status: 'refused', reason: memoMissing() };
	if (stored === 'unreadable') return { status: 'refused', reason: memoUnreadable() };

	const { characteristic, conditionKey } = stored.row;
	const of = findCharacteristic(characteristic);
	const at = conditionOf(entry, stored.row.condition);
	const { secondReverseVoltage } = stored.row.condition;
	if (of?.measuredAs === 'derived' && secondReverseVoltage === undefined)
		return { status: 'refused', reason: derivedHasOneRoute(characteristic) };
	const measured =
		of?.measuredAs === 'reading'
			? await source.readingsOf(characteristic, conditionKey)
			: secondReverseVoltage === undefined
				? await source.devicesAt(at, at.reverseVoltage)
				: await source.ratiosAt(at, [at.reverseVoltage, secondReverseVoltage]);
	return computeEvidence({
		printed: entry.row,
		memo: stored.row,
		rules: stored.rules,
		transform: of?.transform ?? 'ln',
		...measured
	});
}

/** The condition as it is printed, where the document states it; else as the stored limit does. */
function conditionOf(
	entry: LimitEntry,
	stored: { readonly frequency?: number | undefined; readonly reverseVoltage?: number | undefined }
) {
	switch (entry.kind) {
		case 'capacitance':
			return {
				temperatureCelsius: entry.section.temperatureCelsius,
				frequency: entry.section.frequency,
				reverseVoltage: entry.row.bias.value
			};
		case 'characteristic':
			return {
				temperatureCelsius: entry.row.temperatureCelsius,
				frequency: stored.frequency,
				reverseVoltage: stored.reverseVoltage ?? NaN
			};
		default:
			return entry satisfies never;
	}
}
