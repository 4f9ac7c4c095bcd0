import { describe, expect, it } from 'vitest';
import { sayPerson } from './person-words';

const AT = '2026-03-04T12:00:00.000Z';
const here = { role: 'engineer', email: 'vesna@shop.example', lastSignedInAt: null, leftAt: null } as const;

describe('what a person is in the shop', () => {
	it.each([
		[here, /^Is an engineer here\. Signs in as vesna@shop\.example; has not done so yet\.$/],
		[
			{ ...here, role: 'manager', lastSignedInAt: AT } as const,
			/^Is a manager here\. .*; last on 4 March 2026, /
		],
		[
			{ ...here, role: 'installer', lastSignedInAt: AT, leftAt: AT } as const,
			/^Was an installer here, and left on 4 March 2026\. Signed in as .*, last on 4 March 2026, /
		],
		[
			{ ...here, leftAt: AT },
			/^Was an engineer here, and left on 4 March 2026\. The address was vesna@shop\.example\.$/
		]
	])('%j is said plainly', (person, words) => {
		expect(sayPerson(person)).toMatch(words);
	});
});
