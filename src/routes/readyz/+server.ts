import { isReady } from '$lib/server/boot';
import { isDatabaseUp } from '$lib/server/services/health';

/** The process can serve: tables are up to date and the database answers. */
export const GET = async (): Promise<Response> => {
	const ready = isReady() && (await isDatabaseUp());
	return new Response(ready ? 'ready\n' : 'not ready\n', {
		status: ready ? 200 : 503,
		headers: { 'content-type': 'text/plain' }
	});
};
