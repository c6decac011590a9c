import { fixed, pValue } from './digits';
import type { DerivationStep } from './limit';
import { LOTS_DIFFER_BELOW, type LotTest } from './lotTest';

/** The line that compares the lots, and what the method makes of it. */
export function lotStep(lots: LotTest, isPooled: boolean): DerivationStep {
	return {
		name: 'Lots compared, F',
		method: `One-way analysis of variance between ${lots.lots} wafer lots, F(${lots.betweenDegrees}, ${lots.withinDegrees}), ${pValue(lots.p)}. ${verdict(lots, isPooled)}`,
		value: Number.isFinite(lots.F) ? lots.F : null,
		unit: '',
		text: Number.isFinite(lots.F) ? fixed(lots.F, 2) : '∞'
	};
}

function verdict({ p, lots }: LotTest, isPooled: boolean): string {
	if (!isPooled) return 'The spread between lots is part of the limit, whether they differ or not.';
	return p < LOTS_DIFFER_BELOW
		? 'The lots differ and are pooled all the same: the limit speaks of these lots.'
		: `No difference is seen; that ${lots} lots are alike is not shown by it. They are pooled.`;
}
