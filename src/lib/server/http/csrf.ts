const SAFE = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Whether an unsafe request comes from our own pages. Browsers say so in Sec-Fetch-Site; where that is missing the
 * Origin must be ours. A request with neither did not come from a browser page, so it carries no stolen cookie.
 */
export function isForged(request: Request, origin: string): boolean {
	if (SAFE.has(request.method)) return false;
	const site = request.headers.get('sec-fetch-site');
	const from = request.headers.get('origin');
	if (site !== null) return site !== 'same-origin';
	return from !== null && from !== origin;
}
