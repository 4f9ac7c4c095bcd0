/** What every answer carries, whatever made it. The content policy itself is Kit's, with its nonces. */
const ALWAYS: Record<string, string> = {
	'x-content-type-options': 'nosniff',
	'referrer-policy': 'same-origin',
	'x-frame-options': 'DENY',
	'cross-origin-opener-policy': 'same-origin',
	'cross-origin-resource-policy': 'same-origin',
	'permissions-policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()'
};

/** A page that a link alone opens tells nobody where it was opened from, and is never indexed. */
const BY_LINK: Record<string, string> = {
	'referrer-policy': 'no-referrer',
	'x-robots-tag': 'noindex, nofollow, noarchive',
	'cache-control': 'no-store'
};

export function secureHeaders(
	response: Response,
	{ byLink, secure }: { byLink: boolean; secure: boolean }
): void {
	const headers = { ...ALWAYS, ...(byLink ? BY_LINK : {}) };
	for (const [name, value] of Object.entries(headers)) response.headers.set(name, value);
	if (secure) response.headers.set('strict-transport-security', 'max-age=31536000; includeSubDomains');
	if (response.headers.get('content-type')?.startsWith('text/html')) {
		response.headers.set('cache-control', 'no-store');
	}
}
