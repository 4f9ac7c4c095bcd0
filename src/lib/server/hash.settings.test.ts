import { expect, it } from 'vitest';
import { env } from './env';
import { newToken, sha256, tokenHash } from './hash';

process.env.SOAKLINE_SECRET = 'a secret of this installation alone';

it('the hash of a token needs this installation’s secret', () => {
	const token = newToken();
	expect(env().SOAKLINE_SECRET).toBe('a secret of this installation alone');
	expect(Buffer.from(token, 'base64url')).toHaveLength(16);
	expect(tokenHash(token)).toHaveLength(64);
	expect(tokenHash(token)).not.toBe(sha256(token));
	expect(newToken()).not.toBe(token);
});
