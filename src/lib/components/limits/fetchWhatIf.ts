import type { WhatIfAnswer } from '$lib/core/limits/whatIf/whatIfAnswer';
import type { WhatIfRequest } from '$lib/core/limits/whatIf/whatIfRequest';
import { limitsScreenMessages } from '$lib/core/messages/limitsScreen';

export type WhatIfFetched =
	| { readonly status: 'answered'; readonly answer: WhatIfAnswer }
	| { readonly status: 'refused'; readonly message: string };

const isAnswer = (value: unknown): value is WhatIfAnswer =>
	typeof value === 'object' && value !== null && 'rows' in value && 'counts' in value;

/** Asks our own endpoint, whose answer is taken as it is declared; `undefined` when called off. */
export async function fetchWhatIf(
	address: string,
	asked: WhatIfRequest,
	signal: AbortSignal
): Promise<WhatIfFetched | undefined> {
	try {
		const response = await fetch(address, {
			method: 'POST',
			headers: { 'content-type': 'application/json' },
			body: JSON.stringify(asked),
			signal
		});
		const body: unknown = await response.json();
		if (response.ok && isAnswer(body)) return { status: 'answered', answer: body };
		return { status: 'refused', message: detailOf(body) };
	} catch {
		return signal.aborted
			? undefined
			: { status: 'refused', message: limitsScreenMessages.notAsked() };
	}
}

function detailOf(body: unknown): string {
	return typeof body === 'object' &&
		body !== null &&
		'detail' in body &&
		typeof body.detail === 'string'
		? body.detail
		: limitsScreenMessages.notAsked();
}
