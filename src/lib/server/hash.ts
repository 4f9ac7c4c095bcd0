import { createHash, createHmac, randomBytes } from 'node:crypto';
import { env } from './env';

export function sha256(text: string): string {
	return createHash('sha256').update(text).digest('hex');
}

/** 128 random bits, safe in an address. */
export function newToken(): string {
	return randomBytes(16).toString('base64url');
}

/** What the database keeps of a token: useless without this installation's secret. */
export function tokenHash(token: string): string {
	return createHmac('sha256', env().SOAKLINE_SECRET).update(token).digest('hex');
}

/** JSON with sorted keys: the same value always gives the same text, whatever order it was made in. */
export function canonicalJson(value: unknown): string {
	return JSON.stringify(value, (_key, inner: unknown) =>
		inner !== null && typeof inner === 'object' && !Array.isArray(inner)
			? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0)))
			: inner
	);
}
