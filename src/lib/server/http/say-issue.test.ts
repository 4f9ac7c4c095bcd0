import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { validate } from './validate';

const CASES: [string, z.ZodType, unknown, string][] = [
	[
		'a number that is text',
		z.object({ limit: z.coerce.number() }),
		{ limit: 'abc' },
		'limit: must be a number.'
	],
	[
		'a number too large',
		z.object({ limit: z.number().max(100) }),
		{ limit: 101 },
		'limit: must be at most 100.'
	],
	[
		'a list too short',
		z.object({ legs: z.array(z.number()).min(1) }),
		{ legs: [] },
		'legs: must be at least 1 entries.'
	],
	[
		'text too long',
		z.object({ name: z.string().max(3) }),
		{ name: 'four' },
		'name: must be at most 3 characters.'
	],
	['a missing field', z.object({ name: z.string() }), {}, 'name: is missing.'],
	[
		'another word',
		z.object({ sort: z.enum(['newest', 'oldest']) }),
		{ sort: 'x' },
		'sort: must be one of newest, oldest.'
	],
	['an unknown field', z.strictObject({}), { speed: 1 }, 'has fields that are not known here: speed.'],
	['no e-mail address', z.object({ to: z.email() }), { to: 'x' }, 'to: must be an e-mail address.'],
	[
		'a field with words of its own',
		z.object({ to: z.string({ error: 'Say to whom.' }) }),
		{},
		'to: Say to whom.'
	]
];

describe('what is said of input that is wrong', () => {
	it.each(CASES)('about %s', (_about, schema, input, words) => {
		expect(() => validate(schema, input)).toThrow(words);
	});
});
