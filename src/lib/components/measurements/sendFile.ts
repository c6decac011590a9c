/** How the sending of a file ended. */
export type SendOutcome =
	| { readonly status: 'received'; readonly upload: number }
	| { readonly status: 'refused'; readonly message: string; readonly earlier?: number };

interface Answer {
	readonly detail?: unknown;
	readonly upload?: { readonly id?: unknown };
}

/**
 * Sends a file as the raw body of a request, so that the server writes it to disk as it comes.
 * `fetch` can't say how much has been sent; XMLHttpRequest can.
 */
export function sendFile(
	address: string,
	file: File,
	onProgress: (sent: number, total: number) => void
): { readonly ended: Promise<SendOutcome>; readonly cancel: () => void } {
	const request = new XMLHttpRequest();
	const ended = new Promise<SendOutcome>((resolve) => {
		const refuse = (message: string) => resolve({ status: 'refused', message });
		request.upload.addEventListener('progress', ({ loaded, total }) => onProgress(loaded, total));
		request.addEventListener('load', () =>
			resolve(readAnswer(request.status, request.responseText))
		);
		request.addEventListener('abort', () => refuse('The upload was stopped; nothing was kept.'));
		request.addEventListener('error', () =>
			refuse('The connection broke before the file was there; nothing was kept. Try it again.')
		);
		request.open('POST', `${address}?filename=${encodeURIComponent(file.name)}`);
		request.setRequestHeader('content-type', 'text/csv');
		request.send(file);
	});
	return { ended, cancel: () => request.abort() };
}

/** What the server said, from its status and body. */
export function readAnswer(status: number, body: string): SendOutcome {
	const answer = parsed(body);
	const id = answer.upload?.id;
	if (status === 202 && typeof id === 'number') return { status: 'received', upload: id };
	const message =
		typeof answer.detail === 'string'
			? answer.detail
			: `The server answered with ${status}; nothing was kept.`;
	return { status: 'refused', message, ...(typeof id === 'number' ? { earlier: id } : {}) };
}

function parsed(body: string): Answer {
	try {
		const read: unknown = JSON.parse(body);
		return typeof read === 'object' && read !== null ? read : {};
	} catch {
		return {};
	}
}
