/**
 * Tells, as it goes, how far some work is, as server-sent events: `progress` again and again, at last `done` or `failed`.
 *
 * @param follow does the work, or waits for it, and tells its progress
 * @param sayTrouble hears of a failure, of which whoever listens is told nothing but that it was one
 */
export function streamProgress<Progress>(
	follow: (tell: (progress: Progress) => void) => Promise<void>,
	sayTrouble: (error: unknown) => void
): Response {
	const encoder = new TextEncoder();
	let isOpen = true;
	const stream = new ReadableStream<Uint8Array>({
		start(controller) {
			const send = (name: string, data: unknown): void => {
				if (isOpen) controller.enqueue(encoder.encode(`event: ${name}\ndata: ${JSON.stringify(data)}\n\n`));
			};
			follow((progress) => send('progress', progress))
				.then(() => send('done', {}))
				.catch((error: unknown) => {
					sayTrouble(error);
					send('failed', {});
				})
				.finally(() => {
					if (isOpen) controller.close();
					isOpen = false;
				});
		},
		cancel() {
			isOpen = false;
		}
	});
	return new Response(stream, {
		headers: { 'content-type': 'text/event-stream', 'cache-control': 'no-store' }
	});
}
