import { describe, expect, it } from 'vitest';
import { isCommonPassword } from './common-passwords';

const OWN = ['Wren Tollgate', 'wren@lantern-track.example'];

describe('a password', () => {
	it.each([
		['is one common word after the other', 'passwordpassword'],
		['is a common word and a run of digits', 'Password12345678'],
		['is a walk over the keys', 'qwertyuiopasdfghjkl'],
		['is a walk backwards', '9876543210987654'],
		['is one sign over and over', 'zzzzzzzzzzzzzzzzzz'],
		['is a few signs over and over', 'xk7xk7xk7xk7xk7xk7'],
		['is common words with signs between', 'Welcome-love-2024!!'],
		['is the person’s own name and a year', 'WrenTollgate2024'],
		['is the person’s own address', 'wren@lantern-track.example']
	])('is refused when it %s', (_, password) => {
		expect(isCommonPassword(password, OWN)).toBe(true);
	});

	it.each([
		['copper lugs at sunrise'],
		['tape measure and torch'],
		['Wren keeps nine goats'],
		['password is not what I use']
	])('may be “%s”', (password) => {
		expect(isCommonPassword(password, OWN)).toBe(false);
	});
});
