import type { OwnZoneView } from '$lib/schemas/own-zones';
import type { OwnZone, Place } from '../db/models';

export function presentOwnZone(zone: OwnZone, places: readonly Place[]): OwnZoneView {
	const { id, version, name, position, rule, fromValue, toValue, placeIds } = zone;
	return {
		...{ id, version, name, position, rule, fromValue, toValue, placeIds },
		places: places
			.filter(({ ownZoneId }) => ownZoneId === id)
			.map(({ id: placeId, name: placeName }) => ({ id: placeId, name: placeName }))
	};
}
