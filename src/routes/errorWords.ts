export interface ErrorWords {
	readonly title: string;
	readonly kept: string;
	readonly next: string;
}

/** What a page says about an error beside its message: what was kept, and what to do. */
export function errorWords(status: number): ErrorWords {
	if (status === 401 || status === 403)
		return {
			title: 'Not for this account',
			kept: 'Everything stands as it was.',
			next: 'Go back, or sign in as somebody with the role.'
		};
	if (status === 404)
		return {
			title: 'Nothing here',
			kept: 'Everything stands as it was.',
			next: 'Check the address, or start from the worklist.'
		};
	if (status === 413)
		return {
			title: 'Too large',
			kept: 'Nothing of what was sent was stored.',
			next: 'Send it in smaller parts.'
		};
	if (status < 500)
		return {
			title: 'That could not be done',
			kept: 'Everything stands as it was.',
			next: 'Go back and correct it.'
		};
	return {
		title: 'This is our fault',
		kept: 'What was saved before stands. What this request was about to save was not saved.',
		next: 'Try again. If it happens again, tell an administrator the request below.'
	};
}
