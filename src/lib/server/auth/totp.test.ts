import { describe, expect, it } from 'vitest';
import { findStep, keyAddress, newKey } from './totp';

/** RFC 6238, Appendix B: the ASCII secret "12345678901234567890" in base 32, SHA-1; six digits are the last of the eight. */
const KEY = 'GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ';
const PUBLISHED = [
	[59, 0x0000001, '94287082'],
	[1111111109, 0x023523ec, '07081804'],
	[1111111111, 0x023523ed, '14050471'],
	[1234567890, 0x0273ef07, '89005924'],
	[2000000000, 0x03f940aa, '69279037'],
	[20000000000, 0x27bc86aa, '65353130']
] as const;

describe('a code', () => {
	it.each(PUBLISHED)(
		'at %i s belongs to the step that RFC 6238 publishes',
		async (atS, step, eightDigits) => {
			expect(await findStep(KEY, eightDigits.slice(2), atS * 1000)).toBe(step);
		}
	);

	it.each(PUBLISHED)('at %i s with another digit belongs to none', async (atS, _step, eightDigits) => {
		const wrong = eightDigits.slice(2, 7) + String((Number(eightDigits[7]) + 1) % 10);
		expect(await findStep(KEY, wrong, atS * 1000)).toBeNull();
	});

	it.each(['', '05924', '0059245', '00592x', '００５９２４'])('is never “%s”', async (code) => {
		expect(await findStep(KEY, code, 1234567890_000)).toBeNull();
	});

	it('counts one step early and one late, and no more', async () => {
		const code = '005924';
		const at = (steps: number) => findStep(KEY, code, (1234567890 + 30 * steps) * 1000);
		expect(await Promise.all([at(-2), at(-1), at(0), at(1), at(2)])).toEqual([
			...[null, 0x0273ef07, 0x0273ef07, 0x0273ef07, null]
		]);
	});
});

describe('a key', () => {
	it('is 160 bits, another each time, and goes into an address that telephones read', () => {
		const key = newKey();
		expect(key).toMatch(/^[A-Z2-7]{32}$/);
		expect(newKey()).not.toBe(key);
		const address = new URL(keyAddress(key, 'teo@shop.example'));
		expect(address.protocol).toBe('otpauth:');
		expect(address.searchParams.get('secret')).toBe(key);
		expect(address.searchParams.get('issuer')).toBe('Soakline');
	});
});
