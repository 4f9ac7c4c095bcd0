import { generateSecret, generateURI, verify } from 'otplib';

const ISSUER = 'Soakline';
const PERIOD_S = 30;

/** 160 random bits in base 32, as RFC 4226 recommends. */
export const newKey = (): string => generateSecret({ length: 20 });

/** What the picture for the telephone says. */
export const keyAddress = (key: string, account: string): string =>
	generateURI({ issuer: ISSUER, label: account, secret: key });

/**
 * The time step that a code belongs to (RFC 6238: 30 s, six digits, SHA-1), or null when it is none of now: the step
 * before and the one after count too, for clocks that are off and hands that are slow.
 */
export async function findStep(key: string, code: string, nowMs = Date.now()): Promise<number | null> {
	if (!/^\d{6}$/.test(code)) return null;
	const result = await verify({
		...{ secret: key, token: code, strategy: 'totp', period: PERIOD_S },
		epoch: Math.floor(nowMs / 1000),
		epochTolerance: PERIOD_S
	});
	return result.valid && 'timeStep' in result ? result.timeStep : null;
}
