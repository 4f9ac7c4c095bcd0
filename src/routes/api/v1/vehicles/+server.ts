import { endpoint } from '$lib/server/http/endpoint';
import { vehicleOperations } from '$lib/server/http/operations/vehicles';
import { findVehicles } from '$lib/server/services/vehicles';

export const GET = endpoint(vehicleOperations.find, async ({ person, query }) => ({
	rows: await findVehicles(person, query.search)
}));
