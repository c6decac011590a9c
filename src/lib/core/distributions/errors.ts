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
