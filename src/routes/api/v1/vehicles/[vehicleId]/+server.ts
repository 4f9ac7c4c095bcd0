import { endpoint } from '$lib/server/http/endpoint';
import { vehicleOperations } from '$lib/server/http/operations/vehicles';
import { getVehicle, updateVehicle } from '$lib/server/services/vehicles';

export const GET = endpoint(vehicleOperations.get, ({ person, params }) =>
	getVehicle(person, params.vehicleId)
);

export const PUT = endpoint(vehicleOperations.update, ({ person, params, body }) =>
	updateVehicle(person, params.vehicleId, body)
);
