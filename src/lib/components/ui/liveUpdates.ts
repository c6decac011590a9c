import { invalidate } from '$app/navigation';

const GATHER_MILLISECONDS = 150;

/** Loads anew what depends on `platen:data` when the server says something changed; answers how to stop. */
export function followChanges(address = '/api/v1/events'): () => void {
	const source = new EventSource(address);
	let timer: ReturnType<typeof setTimeout> | undefined;
	source.addEventListener('change', () => {
		clearTimeout(timer);
		timer = setTimeout(() => void invalidate('platen:data'), GATHER_MILLISECONDS);
	});
	return () => {
		clearTimeout(timer);
		source.close();
	};
}
