import { LIMITATIONS, type LimitationName } from '$lib/core/limits/limitations';
import { PROMISE, type Cell } from './study';

/** How far below what is stated a cell may come out. */
const ALLOWED_SHORTFALL = 0.01;

export type Verdict =
	| { readonly status: 'holds' }
	| { readonly status: 'limited'; readonly limitation: LimitationName }
	| { readonly status: 'falls short' };

/** Whether a cell keeps the confidence stated, or is known not to. */
export function judge(cell: Cell): Verdict {
	if (cell.confidence >= PROMISE.confidence - ALLOWED_SHORTFALL) return { status: 'holds' };
	const limitation = LIMITATIONS.find(
		({ concerns, lotShare }) =>
			concerns(cell) &&
			('from' in lotShare ? cell.lotShare >= lotShare.from : cell.lotShare <= lotShare.upTo)
	);
	return limitation === undefined
		? { status: 'falls short' }
		: { status: 'limited', limitation: limitation.name };
}

/** Limitations that users are told of although no cell shows them. */
export function unseenLimitations(cells: readonly Cell[]): LimitationName[] {
	const seen = cells.flatMap((cell) => {
		const verdict = judge(cell);
		return verdict.status === 'limited' ? [verdict.limitation] : [];
	});
	return LIMITATIONS.map(({ name }) => name).filter((name) => !seen.includes(name));
}
