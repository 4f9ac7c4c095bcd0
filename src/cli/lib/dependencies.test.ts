import { describe, expect, it } from 'vitest';
import { isUpToDate } from './dependencies.mjs';

const a = { version: '1.0.0', integrity: 'sha512-a' };
const b = { version: '2.0.0', integrity: 'sha512-b' };
const lock = (packages: object) => ({ packages: { '': { name: 'root' }, ...packages } });
const installed = (packages: object) => ({ packages });

describe('isUpToDate', () => {
	it.each([
		['all there', lock({ a, b }), installed({ a, b }), true],
		[
			'an optional one for another system left out',
			lock({ a, b: { ...b, optional: true } }),
			installed({ a }),
			true
		],
		['nothing installed', lock({ a }), null, false],
		['an installation that was broken off', lock({ a }), {}, false],
		['one missing', lock({ a, b }), installed({ a }), false],
		['another version', lock({ a }), installed({ a: { ...a, version: '1.0.1' } }), false],
		[
			'another content under the same version',
			lock({ a }),
			installed({ a: { ...a, integrity: 'x' } }),
			false
		],
		['one too many', lock({ a }), installed({ a, b }), false],
		['a lock that is no lock', null, installed({ a }), false]
	])('%s', (_case, wanted, found, expected) => {
		expect(isUpToDate(wanted, found)).toBe(expected);
	});
});
