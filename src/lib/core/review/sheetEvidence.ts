import { assessRisk } from './assessRisk';
import { againstPrevious, type PreviousRelease } from './previousRow';
import type { SheetRow } from './sheetRows';
import type { ComputedEvidence, VerificationEvidence } from './verificationEvidence';

/** Statement, second route, release before and the risk that follows, as the sheet shows them. */
export function sheetEvidence(
	row: SheetRow,
	computed: ComputedEvidence | null,
	previous: PreviousRelease | undefined
): VerificationEvidence {
	const against = againstPrevious(row, previous);
	return {
		...row.statement,
		computed,
		previous: against.previous,
		...assessRisk(row, computed, against)
	};
}
