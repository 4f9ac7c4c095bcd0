import { idSchema } from '$lib/schemas/fields';
import type { MountView } from '$lib/schemas/mounts';
import type { SignedInPerson } from '$lib/schemas/people';
import { orPageError } from '$lib/server/http/guard';
import { getMount } from '$lib/server/services/mounts';

/** The mount of the address, or the page that says that there is none. */
export async function openMount(
	person: SignedInPerson,
	{ mountId }: { mountId: string }
): Promise<MountView> {
	const parsed = idSchema.safeParse(mountId);
	return orPageError(getMount(person, parsed.success ? parsed.data : 0));
}
