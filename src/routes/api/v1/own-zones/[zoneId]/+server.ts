import { endpoint } from '$lib/server/http/endpoint';
import { ownZoneOperations } from '$lib/server/http/operations/own-zones';
import { removeOwnZone, updateOwnZone } from '$lib/server/services/review/own-zones';

export const PUT = endpoint(ownZoneOperations.update, ({ person, params, body }) =>
	updateOwnZone(person, params.zoneId, body)
);

export const DELETE = endpoint(ownZoneOperations.remove, ({ person, params }) =>
	removeOwnZone(person, params.zoneId)
);
