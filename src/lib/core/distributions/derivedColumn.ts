/** A derived characteristic at one condition: one value a device in SI, NaN where it has none. */
export interface DerivedColumn {
	readonly values: Float64Array;
	/** What each value says: at most (−1), exactly (0), at least (1). Without it all are exact. */
	readonly censored?: Int8Array;
	/** The sets that gave what it is computed from. */
	readonly sets: readonly number[];
}
