import { conditionKey } from '../../src/lib/core/characteristics/condition';
import type { Basis } from '../../src/lib/core/limits/basis';
import type { LimitRow, LimitValue } from '../../src/lib/core/limits/limit';
import type { LimitPolicy, PolicyVersion } from '../../src/lib/core/limits/policy';

/** A policy version as limits name it: 95 % content at 95 % confidence, three lots. */
export function samplePolicy(id = 1, changes: Partial<LimitPolicy> = {}): PolicyVersion {
	return {
		id,
		policy: 'characterized',
		number: 1,
		rules: {
			name: 'Characterized 95/95',
			method: 'normal',
			content: 0.95,
			confidence: 0.95,
			tails: 'each',
			span: 'each-bias',
			minimumLots: 3,
			minimumDevices: 30,
			drift: 0,
			uncertaintyTreatment: 'outwards',
			resolution: { significantFigures: 3 },
			...changes
		}
	};
}

type Text = string | null;

export interface RowTexts {
	readonly bias: number;
	/** Minimum, typical, maximum as printed. */
	readonly texts: readonly [Text, Text, Text];
	readonly temperatureCelsius?: number;
	readonly unit?: string;
	readonly unitScale?: number;
	readonly inputHash?: string;
	readonly policyVersion?: number;
	readonly basis?: Basis;
	readonly refusals?: readonly string[];
	readonly sampleSize?: number;
	readonly independentLots?: number;
}

/** A computed limit with these printed texts. */
export function limitRowOf(of: RowTexts): LimitRow {
	const { bias, texts, temperatureCelsius = 25, unit = 'pF', unitScale = 1e-12 } = of;
	const condition = { temperatureCelsius, frequency: 1e6, reverseVoltage: bias };
	const value = (text: Text): LimitValue | null =>
		text === null
			? null
			: { raw: Number(text) * unitScale, printed: Number(text) * unitScale, text, derivation: [] };
	return {
		characteristic: 'C_tot',
		condition,
		conditionKey: conditionKey(condition),
		unit,
		unitScale,
		minimum: value(texts[0]),
		typical: value(texts[1]),
		maximum: value(texts[2]),
		basis: of.basis ?? 'characterized',
		refusals: [...(of.refusals ?? [])],
		warnings: [],
		sampleSize: of.sampleSize ?? 300,
		independentLots: of.independentLots ?? 3,
		policyVersion: of.policyVersion ?? 1,
		inputHash: of.inputHash ?? `hash of ${texts.join(' ')} at ${bias}`,
		engineVersion: 'test'
	};
}
