import { guard, orPageError } from '$lib/server/http/guard';
import { packHeldData } from '$lib/server/services/held-data';
import type { RequestHandler } from './$types';

/** All that is held about the customer who is signed in. */
export const GET: RequestHandler = async (event) => {
	const person = guard(event, 'held-data.read-own');
	const packed = await orPageError(packHeldData(person));
	return new Response(new Uint8Array(packed), {
		headers: {
			'content-type': 'application/zip',
			'content-disposition': 'attachment; filename="what-is-held-about-you.zip"',
			'cache-control': 'no-store'
		}
	});
};
