/** Raised when distributions of the same devices come out differently than before. */
export const DISTRIBUTION_VERSION = 'distributions-2';

export interface BasisSet {
	readonly id: number;
	/** SHA-256 of the uploaded file. */
	readonly sha256: string;
	readonly uncertainty: number | null;
}

/** A sweep that stays out of the distributions. */
export interface LeftOutSweep {
	readonly set: number;
	/** Row of the device within the set. */
	readonly device: number;
	readonly conditionKey: string;
	readonly why: 'excluded' | 'quarantined';
}

export interface BasisInputs {
	readonly partNumber: string;
	readonly characteristic: string;
	readonly transform: string;
	readonly sets: readonly BasisSet[];
	/** Wafer lot of each lot. */
	readonly waferLots: ReadonlyMap<string, string>;
	readonly leftOut: readonly LeftOutSweep[];
}

/**
 * Everything the distributions of a product depend on, as one text in one order: its hash is the
 * `basisHash`. A new set, a verdict or a corrected lot genealogy changes it; nothing else does.
 */
export function basisText(inputs: BasisInputs): string {
	return JSON.stringify({
		version: DISTRIBUTION_VERSION,
		partNumber: inputs.partNumber,
		characteristic: inputs.characteristic,
		transform: inputs.transform,
		sets: [...inputs.sets]
			.sort((a, b) => a.id - b.id)
			.map(({ id, sha256, uncertainty }) => [id, sha256, uncertainty]),
		waferLots: [...inputs.waferLots].sort(([a], [b]) => (a < b ? -1 : 1)),
		leftOut: inputs.leftOut
			.map(({ set, device, conditionKey, why }) => [set, device, conditionKey, why])
			.map((entry) => JSON.stringify(entry))
			.sort()
	});
}
