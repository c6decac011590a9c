/** A use case that the seed runs refused: the seed ends with the sentence the person would read. */
export class SeedRefusedError extends Error {
	override readonly name = 'SeedRefusedError';
}

/** The outcome, if it has the status that the seed counts on. */
export function must<Outcome extends { readonly status: string }, Status extends Outcome['status']>(
	outcome: Outcome,
	status: Status
): Extract<Outcome, { readonly status: Status }> {
	if (outcome.status === status) return outcome as Extract<Outcome, { readonly status: Status }>;
	throw new SeedRefusedError(JSON.stringify(outcome));
}
