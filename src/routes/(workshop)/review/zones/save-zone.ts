import { fromOwnZoneForm, ownZoneFormOf, type OwnZoneForm } from '$lib/schemas/own-zone-form';
import type { OwnZoneInput } from '$lib/schemas/own-zones';
import type { SignedInPerson } from '$lib/schemas/people';
import { AppError } from '$lib/server/errors';
import { listPlaces } from '$lib/server/services/places';

export const zoneFormFor = (sent: FormData) => ownZoneFormOf(sent.get('rule'));

/** What a form says of a zone; a name that no place has is refused beside its box. */
export async function readZoneForm(person: SignedInPerson, form: OwnZoneForm): Promise<OwnZoneInput> {
	const read = fromOwnZoneForm(form, await listPlaces(person));
	if ('zone' in read) return read.zone;
	const message = `There is no place called ${read.unknown.join(', ')}.`;
	throw new AppError('invalid_input', message, [{ path: 'places', message }]);
}
