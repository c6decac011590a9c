import type { DistributionComponents } from '../../distributions/summary';
import type { Allowance, Side } from '../allowance';
import { computeLimitRow } from '../computeLimitRow';
import type { DerivationStep, LimitRow, LimitValue } from '../limit';
import { FEWEST_LOTS } from '../methods/lots';
import type { LimitPolicy, Resolution } from '../policy';
import { previewDistribution } from './previewDistribution';
import type { PreviewRequest } from './previewRequest';

export interface PreviewLimit {
	readonly raw: number;
	readonly printed: number;
	/** Of the production test; where a guard band was given. */
	readonly test?: number;
}

export interface PreviewAnswer {
	readonly minimum: PreviewLimit | null;
	readonly typical: PreviewLimit | null;
	readonly maximum: PreviewLimit | null;
	/** Distances from the mean in standard deviations of the transformed values. */
	readonly factors: { readonly minimum: number | null; readonly maximum: number | null };
	readonly components?: DistributionComponents;
	readonly testYield?: NonNullable<LimitRow['testYield']>;
	readonly derivation: readonly (DerivationStep & { readonly of: keyof PreviewValues })[];
	readonly warnings: readonly string[];
}

interface PreviewValues {
	readonly minimum: LimitValue | null;
	readonly typical: LimitValue | null;
	readonly maximum: LimitValue | null;
}

export type Preview =
	| { readonly status: 'answered'; readonly answer: PreviewAnswer }
	| {
			readonly status: 'refused';
			readonly message: string;
			readonly requiredSampleSize?: number;
	  };

/** As the default policy prints; a script that wants another step says so. */
const DEFAULT_RESOLUTION: Resolution = { significantFigures: 3 };

/**
 * The limits of values that aren't stored, by a policy that isn't stored either: what a script or a
 * what-if asks. Numbers stay in the unit they came in.
 */
export function previewLimits(request: PreviewRequest): Preview {
	const made = previewDistribution(request);
	if (made.status === 'refused') return made;
	const { distribution } = made;
	const { policy } = request;
	const row = computeLimitRow(distribution, rulesOf(policy), {
		policyVersion: 0,
		condition: { temperatureCelsius: 25 },
		unit: '',
		unitScale: 1,
		inputHash: '',
		symbol: 'x',
		sides: sidesOf(policy.sides),
		allowsHouseRule: true,
		...uncertaintyOf(policy.uncertainty)
	});
	if (row.minimum === null && row.maximum === null) {
		return {
			status: 'refused',
			message: row.refusals.join(' '),
			...(row.requiredSampleSize === undefined
				? {}
				: { requiredSampleSize: row.requiredSampleSize })
		};
	}
	return {
		status: 'answered',
		answer: {
			minimum: limitOf(row.minimum),
			typical: limitOf(row.typical),
			maximum: limitOf(row.maximum),
			factors: { minimum: row.minimum?.factor ?? null, maximum: row.maximum?.factor ?? null },
			...(distribution.components === null ? {} : { components: distribution.components }),
			...(row.testYield === undefined ? {} : { testYield: row.testYield }),
			derivation: derivationOf(row),
			warnings: row.warnings
		}
	};
}

function rulesOf(policy: PreviewRequest['policy']): LimitPolicy {
	const { resolution = DEFAULT_RESOLUTION, guardBand, k } = policy;
	return {
		name: 'preview',
		method: policy.method,
		content: policy.content,
		confidence: policy.confidence,
		tails: policy.tails,
		span: 'each-bias',
		minimumLots: policy.method === 'lots' ? FEWEST_LOTS : 1,
		minimumDevices: 2,
		drift: policy.drift ?? 0,
		uncertaintyTreatment: 'outwards',
		resolution: typeof resolution === 'number' ? { step: resolution } : resolution,
		...(k === undefined ? {} : { k }),
		...(guardBand === undefined ? {} : { guardBand })
	};
}

function sidesOf(sides: PreviewRequest['policy']['sides']): readonly Side[] {
	return sides === 'minimum-and-maximum' ? ['minimum', 'maximum'] : [sides];
}

function uncertaintyOf(
	given: PreviewRequest['policy']['uncertainty']
): { readonly uncertainty: Allowance } | object {
	if (given === undefined) return {};
	return { uncertainty: typeof given === 'number' ? { absolute: given } : given };
}

function limitOf(value: LimitValue | null): PreviewLimit | null {
	if (value === null) return null;
	const { raw, printed, test } = value;
	return { raw, printed, ...(test === undefined ? {} : { test: test.value }) };
}

/** Every line with the limit it belongs to; lines that all share are given once a limit. */
function derivationOf(row: LimitRow): PreviewAnswer['derivation'] {
	return (['minimum', 'typical', 'maximum'] as const).flatMap((of) =>
		[...(row[of]?.derivation ?? []), ...(row[of]?.test?.derivation ?? [])].map((step) => ({
			of,
			...step
		}))
	);
}
