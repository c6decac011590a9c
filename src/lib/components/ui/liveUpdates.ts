import { invalidate } from '$app/navigation';
import { navigating } from '$app/state';

const GATHER_MILLISECONDS = 150;

/**
 * Loads anew what depends on `platen:data` when the server says something changed; answers how to
 * stop. It waits while the person is on the way to another page: the framework gives up a navigation
 * that an invalidation overtakes, and the change may well be what that person just saved.
 */
export function followChanges(address = '/api/v1/events'): () => void {
	const source = new EventSource(address);
	let timer: ReturnType<typeof setTimeout> | undefined;

	function loadSoon() {
		clearTimeout(timer);
		timer = setTimeout(() => {
			if (navigating.to === null) void invalidate('platen:data');
			else loadSoon();
		}, GATHER_MILLISECONDS);
	}

	source.addEventListener('change', loadSoon);
	return () => {
		clearTimeout(timer);
		source.close();
	};
}
