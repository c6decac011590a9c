import type { Distribution } from '$lib/core/distributions/summary';
import type { Side } from '$lib/core/limits/allowance';
import type { DecidedLimit } from '$lib/core/limits/decision/limitDecision';
import { fixed, percent, significant } from '$lib/core/limits/digits';
import type { Capability } from '$lib/core/limits/evidence/capability';
import { rowEvidence, type DevicesOutside } from '$lib/core/limits/evidence/rowEvidence';
import { withoutEachLot } from '$lib/core/limits/evidence/withoutEachLot';
import type { LimitRow } from '$lib/core/limits/limit';
import type { LimitPolicy } from '$lib/core/limits/policy';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';

/** What the stored devices say about the limits of a row, as the sheet lists it. */
export function limitFacts(
	row: LimitRow,
	rules: LimitPolicy,
	distribution: Distribution,
	decided?: DecidedLimit
): { readonly term: string; readonly text: string }[] {
	const isCircular = decided === undefined;
	const { minimum, maximum, capability } = rowEvidence(distribution, row, rules, isCircular);
	const outside = [
		...(minimum === null ? [] : [outsideText('minimum', minimum)]),
		...(maximum === null ? [] : [outsideText('maximum', maximum)])
	];
	return [
		...(decided === undefined ? [] : decisionFacts(decided)),
		...(outside.length === 0 ? [] : [{ term: 'Outside', text: outside.join('; ') }]),
		...(capability === null
			? []
			: [{ term: 'Ppk', text: capabilityText(capability, rules.confidence) }])
	];
}

function decisionFacts({ decision, by, at, reason }: DecidedLimit) {
	const { minimum, typical, maximum } = decision.machine;
	const machine = [minimum, typical, maximum].map((text) => text ?? '–').join(' / ');
	return [
		{ term: 'Machine', text: `${machine} ${decision.unit}` },
		{ term: 'Decided', text: `${by}, ${at.slice(0, 16).replace('T', ' ')} UTC: ${reason}` }
	];
}

function outsideText(side: Side, { count, allowed }: DevicesOutside): string {
	const word = side === 'minimum' ? 'below' : 'above';
	const found = count === null ? 'more than are stored one by one' : String(count);
	return allowed === null ? `${found} ${word}` : `${found} ${word}, ${allowed} allowed`;
}

/** `0.89, at least 0.77 with confidence 95 %: not capable. Circular: …` */
export function capabilityText(
	{ index, lowerBound, word, isCircular }: Capability,
	confidence: number
): string {
	const bound =
		lowerBound === null
			? ''
			: `, at least ${fixed(lowerBound, 2)} with confidence ${percent(confidence)}`;
	const said = `${fixed(index, 2)}${bound}: ${word}.`;
	return isCircular ? `${said} ${limitsScreenMessages.circular()}` : said;
}

/** A limit without one of its lots, before rounding, in the unit of the table. */
export interface WithoutLotText {
	readonly lot: string;
	readonly text: string;
	/** From the limit with all lots. */
	readonly change: string;
	/** Why there is none. */
	readonly refusal: string | null;
}

export function withoutLotTexts(
	row: LimitRow,
	side: Side,
	rules: LimitPolicy,
	distribution: Distribution
): WithoutLotText[] {
	const all = row[side];
	if (all === null) return [];
	const { condition, unit, unitScale, basis, policyVersion, inputHash } = row;
	const each = withoutEachLot(
		distribution,
		// The factor of a whole curve isn't simulated for each lot; each bias stands on its own here.
		{ ...rules, span: 'each-bias' },
		{ condition, unit, unitScale, policyVersion, inputHash, declaredBasis: basis }
	);
	return each.map(({ lot, refusals, ...limits }) => {
		const raw = limits[side];
		return raw === null
			? { lot, text: '', change: '', refusal: refusals.join(' ') }
			: {
					lot,
					text: significant(raw / unitScale, 4),
					change: `${raw >= all.raw ? '+' : ''}${fixed((raw / all.raw - 1) * 100, 2)}\u00a0%`,
					refusal: null
				};
	});
}
