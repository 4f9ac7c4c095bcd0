import type { z } from 'zod';
import { metaOfField, shapeOf } from '$lib/format/form-fields';
import { AppError } from '../errors';
import { orPageError } from './guard';
import { validate } from './validate';

const MOST_SHOWN = 40;

/** The boxes of an address; a form without a script sends every one, also those that were left alone. */
const givenIn = (url: URL): [string, string][] => [...url.searchParams].filter(([, value]) => value !== '');

/** What is wrong with each part of an address, in words. */
function refusalsOf(schema: z.ZodObject, given: Record<string, string>): Map<string, string> {
	const sayNone: z.core.$ZodErrorMap = ({ path = [] }) => {
		const name = String(path[0]);
		const field = shapeOf(schema)[name];
		const label = (field && metaOfField(field).label) ?? name;
		return `There is no ${label.toLowerCase()} “${(given[name] ?? '').slice(0, MOST_SHOWN)}”.`;
	};
	const issues = schema.safeParse(given, { error: sayNone }).error?.issues ?? [];
	return new Map(issues.map(({ path, message }) => [String(path[0]), message]));
}

/** What the address of a page asks for, without what cannot be; and a sentence on each thing that was left out. */
export function readPageQuery<S extends z.ZodObject>(
	schema: S,
	url: URL
): { query: z.output<S>; leftOut: string[] } {
	const given = givenIn(url);
	const refusals = refusalsOf(schema, Object.fromEntries(given));
	const kept = given.filter(([name]) => !refusals.has(name));
	return { query: validate(schema, Object.fromEntries(kept)), leftOut: [...refusals.values()] };
}

/** The same for a file: it would not say that something was left out, and is refused. */
export function pageQuery<S extends z.ZodObject>(schema: S, url: URL): Promise<z.output<S>> {
	return orPageError(
		Promise.resolve().then(() => {
			const { query, leftOut } = readPageQuery(schema, url);
			if (leftOut.length > 0) throw new AppError('invalid_input', leftOut.join(' '));
			return query;
		})
	);
}
