/** A sweep or a set of readings from which a junction quantity can't be derived. */
export class JunctionDataError extends Error {
	override readonly name = 'JunctionDataError';
	constructor(
		readonly quantity: string,
		readonly requirement: string,
		readonly actual: number
	) {
		super(`${quantity} requires ${requirement}, got ${actual}`);
	}
}
