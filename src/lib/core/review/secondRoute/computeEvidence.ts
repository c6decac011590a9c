import type { Transform } from '../../distributions/summary';
import { BASES, type Basis } from '../../limits/basis';
import type { LimitRow } from '../../limits/limit';
import type { LimitPolicy } from '../../limits/policy';
import {
	censoredHasOneRoute,
	conditionNotMeasured,
	memoDiffers
} from '../../messages/verification';
import type { ComputedEvidence, RouteCheck } from '../verificationEvidence';
import { checkPrinted, type Side } from './checkPrinted';
import { allowedOutside, countOutside, listOutside, lotRanges } from './devicesBeyond';
import type { DeviceValue } from './readColumn';
import { recompute } from './recompute';

/** What is printed, as far as the second route looks at it. */
export interface PrintedRow {
	readonly minimum: Printed | null;
	readonly typical: Printed | null;
	readonly maximum: Printed | null;
	readonly basis: Basis | null;
}

interface Printed {
	readonly text: string;
	/** SI */
	readonly value: number;
}

export interface EvidenceInput {
	readonly printed: PrintedRow;
	/** The stored limit the printed numbers came from. */
	readonly memo: LimitRow;
	readonly rules: LimitPolicy;
	readonly devices: readonly DeviceValue[];
	readonly independentLots: number;
	/** Stated systematic uncertainty, relative. */
	readonly uncertainty: number;
	readonly transform: Transform;
	/** Devices of which the reading is only a bound. */
	readonly censored: number;
}

const SIDES = ['minimum', 'typical', 'maximum'] as const;

/**
 * What the second route says of one row:
 *
 *   stored limit = printed? → devices' values → recomputed limits → each printed number checked
 *                                             → devices beyond the printed limits, range of each lot
 */
export function computeEvidence(input: EvidenceInput): ComputedEvidence {
	const { printed, memo, rules, devices } = input;
	const stray = strayText(printed, memo);
	if (stray !== undefined) return { status: 'refused', reason: memoDiffers(stray) };
	if (input.censored > 0) return { status: 'refused', reason: censoredHasOneRoute(input.censored) };
	if (devices.length === 0) return { status: 'refused', reason: conditionNotMeasured() };

	const again = recompute(devices, rules, {
		isShared: memo.minimum !== null && memo.maximum !== null,
		uncertainty: input.uncertainty,
		transform: input.transform
	});
	if (again.status === 'refused') return again;

	const check = (side: Side): RouteCheck | null => {
		const number = printed[side];
		return number === null
			? null
			: checkPrinted(side, number.text, again.limits[side] / memo.unitScale, rules.resolution);
	};
	const limits = {
		minimum: printed.minimum?.value ?? null,
		maximum: printed.maximum?.value ?? null
	};
	const share = again.limits.shareOutside;
	const allowed = allowedOutside(printed.basis ?? weakest, devices.length, {
		share,
		confidence: rules.confidence
	});
	const outside = (side: 'minimum' | 'maximum') =>
		countOutside(devices, side, limits, { allowed, share });
	return {
		status: 'done',
		devices: devices.length,
		independentLots: input.independentLots,
		checks: { minimum: check('minimum'), typical: check('typical'), maximum: check('maximum') },
		outside: { minimum: outside('minimum'), maximum: outside('maximum') },
		devicesOutside: listOutside(devices, limits, memo.unitScale),
		lots: lotRanges(devices, limits, memo.unitScale)
	};
}

const weakest = BASES[BASES.length - 1] ?? 'typical';

/** A stored text that isn't what is printed: the store changed after the sheet was frozen. */
function strayText(printed: PrintedRow, memo: LimitRow): string | undefined {
	for (const side of SIDES) {
		const [shown, stored] = [printed[side], memo[side]];
		if (shown !== null && stored?.text !== shown.text) return stored?.text ?? 'nothing';
	}
	return undefined;
}
