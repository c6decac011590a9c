import { screenedMessages as say } from '../../messages/screened';
import type { Side } from '../allowance';
import { significant } from '../digits';
import type { DerivationStep } from '../limit';
import { CONDITION_NAMES, screenConditions, type ScreenCondition } from './screenConditions';
import {
	knownEdgeLimits,
	plainMargins,
	shareThatPasses,
	type EachPromise,
	type Margin,
	type ScreenedMethod
} from './screenedMargins';
import type { ScreenedRequest } from './screenedRequest';
import type { ScreenedSource } from './screenedSource';
import { sideSteps, sourceSteps } from './screenedSteps';
import type { ScreenWindow } from './screenWindow';

type BySide = Readonly<Record<Side, number | null>>;

/** What passing a test at one condition promises at another. */
export interface ScreenedAnswer {
	/** Raw limits; `null` for a side that was not asked for. */
	readonly minimum: number | null;
	readonly maximum: number | null;
	readonly factors: BySide;
	readonly method: ScreenedMethod;
	/** `fails` when any condition does: the numbers are then no guarantee. */
	readonly verdict: ScreenCondition['verdict'];
	readonly conditions: readonly ScreenCondition[];
	/** Share of devices that pass, from their normal shape; `null` without a window. */
	readonly yield: number | null;
	/** Known parameters: limits for any distribution of the tested value inside the window. */
	readonly edgeRule?: BySide;
	/** The limits without the screen. */
	readonly unscreened: BySide;
	readonly derivation: readonly DerivationStep[];
	readonly warnings: readonly string[];
}

/** Limits of the transformed quantity, how they were found, and what each promises. */
export interface FoundMargins {
	readonly method: ScreenedMethod;
	readonly margins: Readonly<Partial<Record<Side, Margin>>>;
	readonly promise: EachPromise;
}

/** What an answer is written from. */
export interface AnswerParts {
	readonly source: ScreenedSource;
	readonly window: ScreenWindow | null;
	readonly sides: readonly Side[];
	readonly found: FoundMargins;
}

/** The answer of a request whose limits are found: conditions, derivation and warnings beside them. */
export function screenedAnswer(request: ScreenedRequest, parts: AnswerParts): ScreenedAnswer {
	const { source, window, sides, found } = parts;
	const { method, promise } = found;
	const back = (value: number) => (request.transform === 'ln' ? Math.exp(value) : value);
	const bySide = (valueOf: (side: Side) => number | null | undefined): BySide => ({
		minimum: sides.includes('minimum') ? (valueOf('minimum') ?? null) : null,
		maximum: sides.includes('maximum') ? (valueOf('maximum') ?? null) : null
	});
	const limitOf = (value: number | null | undefined) =>
		value === null || value === undefined ? null : back(value);
	const plain = plainMargins(source, promise);
	const raw = bySide((side) => limitOf(found.margins[side]?.limit));
	const unscreened = bySide((side) => back(plain[side].limit));
	const conditions = screenConditions({
		...{ source, window },
		margins: sides.flatMap((side) => found.margins[side] ?? []),
		shown: (value) => significant(back(value), 6)
	});
	return {
		...raw,
		factors: bySide((side) => found.margins[side]?.factor),
		method,
		verdict: worst(conditions),
		conditions,
		yield: window === null ? null : shareThatPasses(source, window),
		...(method === 'truncated-normal' && window !== null
			? {
					edgeRule: bySide((side) =>
						limitOf(knownEdgeLimits(source, window, promise.content)[side])
					)
				}
			: {}),
		unscreened,
		derivation: [
			...sourceSteps(request, source, window),
			...sides.flatMap((side) => {
				const margin = found.margins[side];
				if (margin === undefined) return [];
				const { transform } = request;
				return sideSteps({
					side,
					margin,
					raw: back(margin.limit),
					method,
					promise,
					transform,
					source
				});
			})
		],
		warnings: warningsOf(request, parts, conditions, { raw, unscreened })
	};
}

function worst(conditions: readonly ScreenCondition[]): ScreenCondition['verdict'] {
	const verdicts = conditions.map(({ verdict }) => verdict);
	if (verdicts.includes('fails')) return 'fails';
	return verdicts.includes('not-checked') ? 'not-checked' : 'holds';
}

function warningsOf(
	{ confidence }: ScreenedRequest,
	{ source, sides, found, window }: AnswerParts,
	conditions: readonly ScreenCondition[],
	{ raw, unscreened }: { readonly raw: BySide; readonly unscreened: BySide }
): string[] {
	const named = (verdict: ScreenCondition['verdict']) =>
		conditions.filter((of) => of.verdict === verdict).map(({ name }) => CONDITION_NAMES[name]);
	const [failed, unchecked] = [named('fails'), named('not-checked')];
	return [
		...(failed.length > 0 ? [say.failed(failed)] : []),
		...(unchecked.length > 0 ? [say.notChecked(unchecked)] : []),
		...(found.method === 'truncated-normal' ? [say.distributionMustStay()] : []),
		...(confidence !== undefined && sides.length === 2 && source.sampleSize !== null
			? [say.confidenceShared(confidence, found.promise.confidence)]
			: []),
		...(window === null
			? []
			: sides.filter((side) => !gains(side, raw, unscreened)).map(say.noGain))
	];
}

/** Whether the screen tightens a limit. */
function gains(side: Side, raw: BySide, unscreened: BySide): boolean {
	const [screened, without] = [raw[side] ?? NaN, unscreened[side] ?? NaN];
	return side === 'minimum' ? screened > without : screened < without;
}
