import type { Basis } from '../limits/basis';
import type { LimitRow } from '../limits/limit';
import type { LimitPolicy } from '../limits/policy';
import type { BoundTexts } from './binding';
import { shiftDecimal } from './decimalText';

/**
 * What a computed limit prints on this basis. `typical` promises nothing, so it prints no minimum
 * and no maximum; mean ± kσ is a house rule and prints them only behind a test of every device.
 */
export function boundTextsOf(
	row: LimitRow,
	on: { readonly basis: Basis; readonly rules: LimitPolicy | undefined }
): BoundTexts {
	const isGuaranteed = guarantees(on.basis, on.rules);
	return {
		inputHash: row.inputHash,
		unit: row.unit,
		unitScale: row.unitScale,
		minimum: isGuaranteed ? (row.minimum?.text ?? null) : null,
		typical: row.typical?.text ?? null,
		maximum: isGuaranteed ? (row.maximum?.text ?? null) : null,
		sampleSize: row.sampleSize,
		independentLots: row.independentLots
	};
}

/** Whether a limit by these rules may be printed as a minimum or maximum on this basis. */
export function guarantees(basis: Basis, rules: LimitPolicy | undefined): boolean {
	return basis !== 'typical' && (rules?.method !== 'sigma' || basis === 'tested');
}

/** The basis a computation gives by itself; anything stronger is declared by a person. */
export function computedBasis(rules: LimitPolicy): Basis {
	return rules.method === 'sigma' ? 'typical' : 'characterized';
}

export const PARTS = ['minimum', 'typical', 'maximum'] as const;
export type Part = (typeof PARTS)[number];

type Scaled = Pick<BoundTexts, 'unit' | 'unitScale' | 'minimum' | 'typical' | 'maximum'>;

/** The same numbers in another unit of the same quantity, every digit kept. */
export function inUnit<T extends Scaled>(texts: T, unit: string, unitScale: number): T {
	const by = Math.round(Math.log10(texts.unitScale / unitScale));
	const moved = (text: string | null) => (text === null ? null : shiftDecimal(text, by));
	return {
		...texts,
		unit,
		unitScale,
		minimum: moved(texts.minimum),
		typical: moved(texts.typical),
		maximum: moved(texts.maximum)
	};
}

/** Whether two bindings print the same numbers, whatever data are behind them. */
export function printsTheSame(a: BoundTexts, b: BoundTexts): boolean {
	const other = a.unit === b.unit ? b : inUnit(b, a.unit, a.unitScale);
	return PARTS.every((part) => a[part] === other[part]);
}

/** `10.9 / 11.8 / 12.7 pF`, with an en dash for what is not printed. */
export function threeTexts(
	of: Pick<BoundTexts, 'minimum' | 'typical' | 'maximum' | 'unit'>
): string {
	return `${[of.minimum, of.typical, of.maximum].map((text) => text ?? '–').join(' / ')} ${of.unit}`;
}
