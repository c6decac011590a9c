import type { Transform } from './summary';

/** A logarithm was asked of a value that has none. */
export class TransformDomainError extends Error {
	override readonly name = 'TransformDomainError';
	constructor(
		readonly transform: Transform,
		readonly value: number
	) {
		super(`${transform} requires a value above zero, got ${value}`);
	}
}

/** Stored bytes are not what `packGroups` writes. */
export class PackedGroupsError extends Error {
	override readonly name = 'PackedGroupsError';
	constructor(readonly requirement: string) {
		super(`packed groups require ${requirement}`);
	}
}

/** A floor that is not below the ceiling: every reading would be censored on both sides. */
export class CensoringError extends Error {
	override readonly name = 'CensoringError';
	constructor(
		readonly floor: number,
		readonly ceiling: number
	) {
		super(`censoring requires a floor below the ceiling, got ${floor} and ${ceiling}`);
	}
}

/** A summary that no sample can have. */
export class EnteredDistributionError extends Error {
	override readonly name = 'EnteredDistributionError';
	constructor(
		readonly requirement: string,
		readonly actual: number
	) {
		super(`an entered distribution requires ${requirement}, got ${actual}`);
	}
}

/** Stored bytes are not what `packJoint` writes. */
export class PackedJointError extends Error {
	override readonly name = 'PackedJointError';
	constructor(readonly requirement: string) {
		super(`a packed joint distribution requires ${requirement}`);
	}
}

/** A junction potential with which the logarithm of V_R + V_j does not exist at the lowest bias. */
export class InterpolationError extends Error {
	override readonly name = 'InterpolationError';
	constructor(
		readonly junctionPotential: number,
		readonly lowestBias: number
	) {
		super(
			`interpolation requires a junction potential above ${-lowestBias} V, got ${junctionPotential} V`
		);
	}
}
