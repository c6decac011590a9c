import { requirePermission } from '$lib/server/auth/requirePermission';
import type { RequestHandler } from './$types';

const HEARTBEAT_MILLISECONDS = 20_000;

/** One stream a signed-in page: `change` after something was committed, here or elsewhere. */
export const GET: RequestHandler = ({ locals }) => {
	requirePermission(locals, 'account.manage');
	const { changes } = locals;
	const encoder = new TextEncoder();
	let stop = () => {};

	const stream = new ReadableStream<Uint8Array>({
		start(controller) {
			const say = (text: string) => controller.enqueue(encoder.encode(text));
			say('retry: 2000\n\n');
			const heartbeat = setInterval(() => say(': still here\n\n'), HEARTBEAT_MILLISECONDS);
			let stopListening = () => {};
			stop = () => {
				clearInterval(heartbeat);
				stopListening();
			};
			stopListening = changes.listen(
				() => say('event: change\ndata: {}\n\n'),
				() => {
					stop();
					controller.close();
				}
			);
		},
		// The reader went away: the stream is closed already.
		cancel: () => stop()
	});
	return new Response(stream, {
		headers: {
			'content-type': 'text/event-stream',
			'cache-control': 'no-store',
			'x-accel-buffering': 'no'
		}
	});
};
