const BYTES = 16;

/** A key that no other sending has: also where the page is not served over TLS, unlike the browser's own. */
export const randomKey = (): string =>
	Array.from(crypto.getRandomValues(new Uint8Array(BYTES)), (byte) =>
		byte.toString(16).padStart(2, '0')
	).join('');
