import type { z } from 'zod';

type RawIssue = Parameters<z.core.$ZodErrorMap>[0];

const TYPE_WORDS: Readonly<Record<string, string>> = {
	number: 'a number',
	int: 'a whole number',
	string: 'text',
	boolean: 'true or false',
	array: 'a list',
	object: 'an object',
	record: 'an object',
	date: 'a date'
};
const FORMAT_WORDS: Readonly<Record<string, string>> = {
	email: 'an e-mail address',
	url: 'an address that begins with http',
	datetime: 'a date and time such as 2026-12-01T14:30:00Z',
	uuid: 'a UUID'
};
const SIZE_WORDS: Readonly<Record<string, string>> = { string: ' characters', array: ' entries' };

type Sayings = { [Code in RawIssue['code']]?: (issue: Extract<RawIssue, { code: Code }>) => string };

const SAYINGS: Sayings = {
	invalid_type: ({ expected, input }) =>
		input === undefined ? 'is missing.' : `must be ${TYPE_WORDS[expected] ?? expected}.`,
	invalid_value: ({ values }) =>
		values.length === 1
			? `must be ${String(values[0])}.`
			: `must be one of ${values.map(String).join(', ')}.`,
	too_big: ({ maximum, origin }) => `must be at most ${String(maximum)}${SIZE_WORDS[origin] ?? ''}.`,
	too_small: ({ minimum, origin }) => `must be at least ${String(minimum)}${SIZE_WORDS[origin] ?? ''}.`,
	invalid_format: ({ format }) => `must be ${FORMAT_WORDS[format] ?? `in the form of ${format}`}.`,
	unrecognized_keys: ({ keys }) => `has fields that are not known here: ${keys.join(', ')}.`,
	invalid_union: () => 'has none of the forms that it may have.'
};

/** What is wrong with a field in plain words, where its schema has none of its own. */
export function sayIssue(issue: RawIssue): string | undefined {
	const say = SAYINGS[issue.code] as ((issue: RawIssue) => string) | undefined;
	return say?.(issue);
}
