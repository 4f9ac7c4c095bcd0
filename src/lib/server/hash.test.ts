import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import { canonicalJson, sha256 } from './hash';

describe('hashes', () => {
	it('are those of FIPS 180-4 (the published digest of "abc")', () => {
		expect(sha256('abc')).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
	});

	it('give the same text for the same value, whatever order it was made in', () => {
		expect(canonicalJson({ b: [1, { d: 1, c: 2 }], a: null })).toBe('{"a":null,"b":[1,{"c":2,"d":1}]}');
		fc.assert(
			fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (value) => {
				const turned = Object.fromEntries(Object.entries(value).reverse());
				return canonicalJson(turned) === canonicalJson(value);
			})
		);
	});

	it('read back to the same numbers, to the last digit', () => {
		const value = { tempC: 0.1 + 0.2, small: 5e-324 };
		expect(JSON.parse(canonicalJson(value))).toEqual(value);
	});
});
