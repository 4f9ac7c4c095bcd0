import { createHash, createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { env } from './env';

export function sha256(content: string | Uint8Array): string {
	return createHash('sha256').update(content).digest('hex');
}

/** 128 random bits, safe in an address. */
export function newToken(): string {
	return randomBytes(16).toString('base64url');
}

/** What the database keeps of a token: useless without this installation's secret. */
export function tokenHash(token: string): string {
	return createHmac('sha256', env().SOAKLINE_SECRET).update(token).digest('hex');
}

/** Goes along with what a page sends back, so that it comes back as it was; `purpose` keeps one use apart from another. */
export const sealOf = (purpose: string, text: string): string => tokenHash(`${purpose}\n${text}`);

export function isSealed(purpose: string, text: string, seal: string): boolean {
	const expected = Buffer.from(sealOf(purpose, text));
	const given = Buffer.from(seal);
	return expected.length === given.length && timingSafeEqual(expected, given);
}

/** JSON with sorted keys: the same value always gives the same text, whatever order it was made in. */
export function canonicalJson(value: unknown): string {
	return JSON.stringify(value, (_key, inner: unknown) =>
		inner !== null && typeof inner === 'object' && !Array.isArray(inner)
			? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)))
			: inner
	);
}
