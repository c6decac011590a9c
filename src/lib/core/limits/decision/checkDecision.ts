import type { Distribution } from '../../distributions/summary';
import { limitsScreenMessages } from '../../messages/limitsScreen';
import { readNumber } from '../../units/readNumber';
import { inSi } from '../../units/unit';
import type { Side } from '../allowance';
import { BASIS_WORDS, type Basis } from '../basis';
import { devicesOutside } from '../evidence/rowEvidence';
import type { LimitRow } from '../limit';
import type { LimitPolicy } from '../policy';
import type { LimitDecision } from './limitDecision';

const SIDES = ['minimum', 'maximum'] as const;

/**
 * Why printed limits can't be decided like this; empty when they can. A person may print another
 * limit than the machine, but none that is out of order, and none that leaves more stored devices
 * outside than its basis allows, unless that is intended and said.
 */
export function checkDecision(
	decision: Pick<LimitDecision, Side | 'testerUncertainty' | 'isOutsideIntended'>,
	of: {
		readonly row: LimitRow;
		readonly rules: LimitPolicy;
		readonly distribution: Distribution;
		readonly basis: Basis;
	}
): string[] {
	const { row } = of;
	const unread = SIDES.filter((side) => {
		const text = decision[side];
		return text !== null && !((readNumber(text) ?? -1) > 0);
	});
	if (unread.length > 0) return unread.map((side) => limitsScreenMessages.limitUnread(side));
	const isPrinted = (side: Side) => decision[side] === null || decision[side] === row[side]?.text;
	if (decision.testerUncertainty === null && SIDES.every(isPrinted)) {
		return [limitsScreenMessages.decidesNothing()];
	}

	const numbers = {
		minimum: valueOf(decision.minimum ?? row.minimum?.text),
		typical: valueOf(row.typical?.text),
		maximum: valueOf(decision.maximum ?? row.maximum?.text)
	};
	return [...outOfOrder(numbers), ...tooManyOutside(decision, of)];
}

const valueOf = (text: string | undefined) => (text === undefined ? null : Number(text));

function outOfOrder({
	minimum,
	typical,
	maximum
}: Record<'minimum' | 'typical' | 'maximum', number | null>): string[] {
	const isAbove = (a: number | null, b: number | null) => a !== null && b !== null && a > b;
	return [
		...(isAbove(minimum, typical) ? [limitsScreenMessages.outOfOrder('minimum', 'typical')] : []),
		...(isAbove(typical, maximum) ? [limitsScreenMessages.outOfOrder('typical', 'maximum')] : [])
	];
}

function tooManyOutside(
	decision: Pick<LimitDecision, Side | 'isOutsideIntended'>,
	{ row, rules, distribution, basis }: Parameters<typeof checkDecision>[1]
): string[] {
	if (decision.isOutsideIntended) return [];
	const { unit, unitScale, sampleSize } = row;
	return SIDES.flatMap((side) => {
		const text = decision[side];
		if (text === null || distribution.extremes.lowest.length === 0) return [];
		const { count, allowed } = devicesOutside(distribution, {
			side,
			printed: inSi(Number(text), { symbol: unit, scale: unitScale }),
			basis,
			limit: row[side],
			rules
		});
		return allowed === null || (count ?? Infinity) <= allowed
			? []
			: [
					limitsScreenMessages.tooManyOutside(side, `${text}\u00a0${unit}`, {
						count,
						allowed,
						sampleSize,
						basis: BASIS_WORDS[basis]
					})
				];
	});
}
