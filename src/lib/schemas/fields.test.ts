import { describe, expect, it } from 'vitest';
import { optionalPhone } from './fields';

const phone = optionalPhone('Telephone');
const TAKES =
	'Telephone takes only digits, spaces, + ( ) - . / and an extension such as "ext 12" at its end.';
const refusalOf = (text: string): string | undefined => phone.safeParse(text).error?.issues[0]?.message;

describe('a telephone number', () => {
	it.each([
		'',
		'112',
		'00 0000 0101',
		'+61 (0)8 0000-0000',
		'00.00/000',
		'00–00‑00—0',
		'00 0000 ext 12',
		'000 000 x7'
	])('may be written "%s"', (text) => {
		expect(phone.parse(text)).toBe(text);
	});

	it.each(['call Ada', '00 0000 Ada', '+ ( )', 'ext 12', '+ ext 12', '00 0000 ext', '00 0000; 00 0001'])(
		'may not be "%s"',
		(text) => {
			expect(refusalOf(text)).toBe(TAKES);
		}
	);

	it('has no more than 40 characters', () => {
		expect(refusalOf('0'.repeat(40))).toBeUndefined();
		expect(refusalOf('0'.repeat(41))).toBe('Telephone must be 40 characters or fewer.');
	});
});
