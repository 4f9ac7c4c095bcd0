import { error } from '@sveltejs/kit';
import { idSchema } from '$lib/schemas/fields';

/** The number of a record in the address of a page; an address without one leads nowhere. */
export function pageId(text: string | undefined): number {
	const parsed = idSchema.safeParse(text);
	if (!parsed.success) error(404, { message: 'There is no such page.', code: 'not_found' });
	return parsed.data;
}
