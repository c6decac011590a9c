import type { Transform } from './summary';

interface TransformPair {
	readonly apply: (value: number) => number;
	readonly invert: (transformed: number) => number;
	/** How the transformed quantity is written before its symbol. */
	readonly prefix: string;
}

/** Value → what is summed up, and back. */
export const TRANSFORMS = {
	identity: { apply: (value) => value, invert: (transformed) => transformed, prefix: '' },
	ln: { apply: Math.log, invert: Math.exp, prefix: 'ln ' },
	log10: { apply: Math.log10, invert: (transformed) => 10 ** transformed, prefix: 'log₁₀ ' }
} as const satisfies Record<Transform, TransformPair>;
