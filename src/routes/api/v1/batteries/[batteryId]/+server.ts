import { endpoint } from '$lib/server/http/endpoint';
import { batteryOperations } from '$lib/server/http/operations/batteries';
import { getBattery, updateBattery } from '$lib/server/services/batteries';

export const GET = endpoint(batteryOperations.get, ({ person, params }) =>
	getBattery(person, params.batteryId)
);

export const PUT = endpoint(batteryOperations.update, ({ person, params, body }) =>
	updateBattery(person, params.batteryId, body)
);
