/**
 * A use case that can't go on, for a reason a person can act on. Its message is a whole sentence
 * fit to be shown; anything else that is thrown is a fault of ours and is not.
 */
export class RefusalError extends Error {
	override readonly name = 'RefusalError';
}
