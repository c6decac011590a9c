import { requirePermission } from '$lib/server/auth/requirePermission';
import type { RequestHandler } from './$types';

const HEARTBEAT_MILLISECONDS = 20_000;

/** One stream a signed-in page: `change` after something was committed, here or elsewhere. */
export const GET: RequestHandler = ({ locals, request }) => {
	requirePermission(locals, 'account.manage');
	const { changes } = locals;
	const encoder = new TextEncoder();

	const stream = new ReadableStream<Uint8Array>({
		start(controller) {
			const say = (text: string) => controller.enqueue(encoder.encode(text));
			const stopListening = changes.listen(() => say('event: change\ndata: {}\n\n'), end);
			const heartbeat = setInterval(() => say(': still here\n\n'), HEARTBEAT_MILLISECONDS);
			let hasEnded = false;
			function end() {
				if (hasEnded) return;
				hasEnded = true;
				clearInterval(heartbeat);
				stopListening();
				controller.close();
			}
			request.signal.addEventListener('abort', end);
			say('retry: 2000\n\n');
		}
	});
	return new Response(stream, {
		headers: {
			'content-type': 'text/event-stream',
			'cache-control': 'no-store',
			'x-accel-buffering': 'no'
		}
	});
};
