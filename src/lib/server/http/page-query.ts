import type { z } from 'zod';
import { orPageError } from './guard';
import { validate } from './validate';

/** What the address of a page asks for; a form without a script sends every box, also those that were left alone. */
export function pageQuery<S extends z.ZodType>(schema: S, url: URL): Promise<z.output<S>> {
	const given = [...url.searchParams].filter(([, value]) => value !== '');
	return orPageError(Promise.resolve().then(() => validate(schema, Object.fromEntries(given))));
}
