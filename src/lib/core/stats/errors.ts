/** An argument for which the statistic is not defined. */
export class OutsideDomainError extends Error {
	override readonly name = 'OutsideDomainError';
	constructor(
		readonly statistic: string,
		readonly requirement: string,
		readonly actual: number
	) {
		super(`${statistic} requires ${requirement}, got ${actual}`);
	}
}

/** Fewer devices than the statistic needs. */
export class SampleTooSmallError extends Error {
	override readonly name = 'SampleTooSmallError';
	constructor(
		readonly statistic: string,
		readonly required: number,
		readonly actual: number
	) {
		super(`${statistic} requires at least ${required} devices, got ${actual}`);
	}
}

/** Fewer independent lots (or wafers in them) than the statistic needs. */
export class TooFewLotsError extends Error {
	override readonly name = 'TooFewLotsError';
	constructor(
		readonly statistic: string,
		readonly required: number,
		readonly actual: number
	) {
		super(`${statistic} requires at least ${required} independent lots, got ${actual}`);
	}
}

/** A solution that the method could not reach. */
export class NoSolutionError extends Error {
	override readonly name = 'NoSolutionError';
	constructor(
		readonly statistic: string,
		readonly reason: string
	) {
		super(`${statistic} has no solution: ${reason}`);
	}
}
