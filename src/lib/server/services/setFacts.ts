import type { Basis } from './readBasis';

/** What the sets behind a distribution say of it. */
export interface SetFacts {
	/** The largest uncertainty they state, relative; `null` when none states one. */
	readonly uncertainty: number | null;
	readonly excluded: number;
	readonly quarantined: number;
}

/**
 * What the basis knows of one measured thing (a sweep's condition, a characteristic at a condition).
 *
 * @param measured its key, as suspects and verdicts name it
 */
export function setFacts({ inputs }: Basis, measured: string) {
	const leftOut = inputs.leftOut.filter(({ conditionKey }) => conditionKey === measured);
	const rows = new Set(leftOut.map(({ set, device }) => `${set} ${device}`));
	return {
		/** Whether a verdict or quarantine leaves this row of the set out. */
		isLeftOut: (set: number, row: number): boolean => rows.has(`${set} ${row}`),
		/** What the sets that contributed say. */
		of(contributing: readonly number[]): SetFacts {
			const from = new Set(contributing);
			const stated = inputs.sets.flatMap(({ id, uncertainty }) =>
				from.has(id) && uncertainty !== null ? [uncertainty] : []
			);
			const count = (why: string) =>
				leftOut.filter((sweep) => from.has(sweep.set) && sweep.why === why).length;
			return {
				uncertainty: stated.length === 0 ? null : Math.max(...stated),
				excluded: count('excluded'),
				quarantined: count('quarantined')
			};
		}
	};
}
