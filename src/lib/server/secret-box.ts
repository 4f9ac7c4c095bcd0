import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import { env } from './env';

const CIPHER = 'aes-256-gcm';
const NONCE_BYTES = 12;
const TAG_BYTES = 16;

const keyFor = (purpose: string): Buffer =>
	Buffer.from(hkdfSync('sha256', env().SOAKLINE_SECRET, '', purpose, 32));

/** Encrypts a short text with a key of this installation; `purpose` is bound to it, so that it opens for no other. */
export function lockText(purpose: string, text: string): string {
	const nonce = randomBytes(NONCE_BYTES);
	const cipher = createCipheriv(CIPHER, keyFor(purpose), nonce);
	const locked = Buffer.concat([cipher.update(text, 'utf8'), cipher.final()]);
	return Buffer.concat([nonce, cipher.getAuthTag(), locked]).toString('base64url');
}

/** Throws when it was locked for another purpose, by another installation, or was changed. */
export function unlockText(purpose: string, box: string): string {
	const bytes = Buffer.from(box, 'base64url');
	const nonce = bytes.subarray(0, NONCE_BYTES);
	const decipher = createDecipheriv(CIPHER, keyFor(purpose), nonce, { authTagLength: TAG_BYTES });
	decipher.setAuthTag(bytes.subarray(NONCE_BYTES, NONCE_BYTES + TAG_BYTES));
	const locked = bytes.subarray(NONCE_BYTES + TAG_BYTES);
	return Buffer.concat([decipher.update(locked), decipher.final()]).toString('utf8');
}
